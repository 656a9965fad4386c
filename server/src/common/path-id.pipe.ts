import { Injectable, type PipeTransform } from '@nestjs/common';
import { idSchema } from '@pegwell/shared/contract/page';
import { notFound } from './problem';

/** An id in a path. A malformed one is not there, like any other that is not. */
@Injectable()
export class PathIdPipe implements PipeTransform<string, string> {
  transform(value: string): string {
    const id = idSchema.safeParse(value);
    if (!id.success) throw notFound();
    return id.data;
  }
}
