import { IMPORT_MAX_BYTES, type ImportReport } from '@pegwell/shared/contract/tunes';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { newId } from '../../../lib/new-id';
import { ProblemError, sentenceOf } from '../../../lib/problem';
import { importTunes } from '../api/import-tunes';
import { libraryKey } from '../api/tune-list';

const TOO_LARGE = `A file of tunes is at most ${IMPORT_MAX_BYTES / 1024 / 1024} MB.`;

/** A file from being chosen to being written: what it would do first, then the doing. */
export function useImport(circleId: string, onWritten: (report: ImportReport) => void) {
  const client = useQueryClient();
  const [file, setFile] = useState<File | null>(null);
  const preview = useMutation({
    mutationFn: (chosen: File) => {
      // A file that is refused anyway need not travel.
      if (chosen.size > IMPORT_MAX_BYTES) throw tooLarge();
      return importTunes(circleId, chosen, { dryRun: true });
    },
  });
  const writing = useMutation({
    mutationFn: ({ chosen, progress }: { chosen: File; progress: string }) =>
      importTunes(circleId, chosen, { dryRun: false, progress }),
    // Also when the page was left meanwhile.
    onSuccess: async (report) => {
      onWritten(report);
      await client.invalidateQueries({ queryKey: libraryKey(circleId) });
    },
  });
  const error = writing.error ?? preview.error;
  return {
    file,
    /** What the file would do, once read. */
    preview: preview.data,
    reading: preview.isPending,
    /** Under which the writing can be watched; null while nothing is written. */
    progressId: writing.isPending ? writing.variables.progress : null,
    /** What was done. */
    done: writing.data,
    /** What is wrong with the file, or with the sending of it. */
    error: error ? sentenceAt('file', error) : undefined,
    /** Whether the writing failed, and the file was not read wrongly before. */
    failedToWrite: writing.isError,
    choose: (chosen: File) => {
      setFile(chosen);
      writing.reset();
      preview.mutate(chosen);
    },
    write: () => {
      if (file && !writing.isPending) writing.mutate({ chosen: file, progress: newId() });
    },
  };
}

const tooLarge = () =>
  new ProblemError({
    status: 413,
    code: 'too-large',
    detail: TOO_LARGE,
    errors: [{ path: 'file', message: TOO_LARGE }],
  });

function sentenceAt(path: string, error: unknown): string {
  const at = error instanceof ProblemError ? error.errors.filter((issue) => issue.path === path) : [];
  return at.length > 0 ? at.map(({ message }) => message).join(' ') : sentenceOf(error);
}
