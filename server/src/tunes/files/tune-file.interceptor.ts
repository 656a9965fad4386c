import {
  BadRequestException,
  Injectable,
  PayloadTooLargeException,
  type CallHandler,
  type ExecutionContext,
} from '@nestjs/common';
import type { Request } from 'express';
import { FileInterceptor } from '@nestjs/platform-express';
import { CHOICES_MAX_LENGTH } from '@pegwell/shared/contract/import-choices';
import { IMPORT_MAX_BYTES, type TuneFileFormat } from '@pegwell/shared/contract/tunes';
import { ProblemException } from '../../common/problem';

/** What multer keeps of an upload in memory. */
export interface UploadedTuneFile {
  readonly originalname: string;
  readonly buffer: Buffer;
}

/** By the extension of its name, in any case. */
export function formatOf(fileName: string): TuneFileFormat {
  const extension = /\.(abc|csv)$/i.exec(fileName)?.[1]?.toLowerCase();
  if (extension === 'abc' || extension === 'csv') return extension;
  const message = 'Tunes are read from files whose names end in .csv or .abc.';
  throw new ProblemException('wrong-media-type', message, { errors: [{ path: 'file', message }] });
}

/** One file in memory, at most as large as an import may be; its name, if it has one, is judged before it is read. */
const Multipart = FileInterceptor('file', {
  limits: { fileSize: IMPORT_MAX_BYTES, files: 1, fields: 10, fieldSize: CHOICES_MAX_LENGTH, parts: 11 },
  fileFilter: (request: Request, file, done) => {
    if (request.query['pasted'] !== 'true') formatOf(file.originalname);
    done(null, true);
  },
});

/** Takes the upload, and says what is wrong with it at `file`. */
@Injectable()
export class TuneFileInterceptor extends Multipart {
  override async intercept(context: ExecutionContext, next: CallHandler) {
    try {
      return await super.intercept(context, next);
    } catch (error) {
      if (error instanceof PayloadTooLargeException) {
        const message = `A file of tunes is at most ${IMPORT_MAX_BYTES / 1024 / 1024} MB.`;
        throw new ProblemException('too-large', message, { errors: [{ path: 'file', message }] });
      }
      if (error instanceof BadRequestException) {
        const message = `The file comes alone, as "file" (${error.message}).`;
        throw new ProblemException('not-valid', message, { errors: [{ path: 'file', message }] });
      }
      throw error;
    }
  }
}
