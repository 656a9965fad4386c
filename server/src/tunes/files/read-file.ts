import { IMPORT_MAX_TUNES, type ImportReport, type TuneFileFormat } from '@pegwell/shared/contract/tunes';
import { read, refused, type Parsed } from '@pegwell/shared/music/parsed';
import { decode } from './decode';
import type { TuneFile } from './file-tune';
import { readAbc } from './read-abc';
import { readCsv, type NoTable } from './read-csv';
import { readList } from './read-list';
import { formatOfPasted } from './read-pasted';

export interface Upload {
  /** By the file's name; null for pasted words, which tell it themselves. */
  readonly format: TuneFileFormat | null;
  readonly bytes: Uint8Array;
}

export interface ReadFile extends TuneFile {
  readonly format: ImportReport['format'];
  readonly encoding: string;
}

const READERS: Readonly<Record<ReadFile['format'], (text: string, limit: number) => TuneFile | NoTable>> = {
  abc: readAbc,
  csv: readCsv,
  list: readList,
};

/** The tunes of a file, or the sentence that says why it is none of tunes. */
export function readFile({ format, bytes }: Upload): Parsed<ReadFile> {
  const decoded = decode(Buffer.from(bytes.buffer, bytes.byteOffset, bytes.byteLength));
  if (!decoded.ok) return decoded;
  const { text, encoding } = decoded.value;
  const written = format ?? formatOfPasted(text);
  const file = READERS[written](text, IMPORT_MAX_TUNES);
  if ('reason' in file) return refused(file.reason);
  if (file.tunes.length > IMPORT_MAX_TUNES) {
    return refused(`This file holds more than ${IMPORT_MAX_TUNES} tunes. Cut it in parts.`);
  }
  return read({ ...file, format: written, encoding });
}
