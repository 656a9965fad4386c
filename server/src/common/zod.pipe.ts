import { Injectable, type ArgumentMetadata, type PipeTransform } from '@nestjs/common';
import type { FieldError } from '@pegwell/shared/contract/errors';
import { isZodDto } from 'nestjs-zod/dto';
import type { z } from 'zod';
import { ProblemException } from './problem';

/** The one pipe: a body or query whose class is made from a zod schema is parsed by it, all issues told. */
@Injectable()
export class ZodPipe implements PipeTransform {
  transform(value: unknown, metadata: ArgumentMetadata): unknown {
    const type: unknown = metadata.metatype;
    if (!isZodDto(type)) return value;
    const parsed = (type.schema as z.ZodType).safeParse(value ?? {});
    if (parsed.success) return parsed.data;
    const errors = parsed.error.issues.flatMap(fieldErrors);
    throw new ProblemException('not-valid', errors[0]?.message, { errors });
  }
}

function fieldErrors(issue: z.core.$ZodIssue): FieldError[] {
  if (issue.code === 'unrecognized_keys') {
    return issue.keys.map((key) => ({
      path: [...issue.path, key].map(String).join('.'),
      message: `There is no field "${key}" here.`,
    }));
  }
  return [{ path: issue.path.map(String).join('.'), message: issue.message }];
}
