import { IMPORT_MAX_BYTES, type ImportReport } from '@pegwell/shared/contract/tunes';
import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { newId } from '../../../lib/new-id';
import { ProblemError, sentenceOf } from '../../../lib/problem';
import { importTunes, type ImportSource } from '../api/import-tunes';
import { libraryKey } from '../api/tune-list';
import { NO_CHOICES, type ImportChoices } from '../import-choices';

const TOO_LARGE = `A file of tunes is at most ${IMPORT_MAX_BYTES / 1024 / 1024} MB.`;
/** How often an import is asked for again when the connection breaks, and after how many milliseconds. */
const TRIES = 6;
const pauseBefore = (tries: number) => Math.min(1_000 * 2 ** tries, 10_000);

const isLost = (error: unknown) => error instanceof ProblemError && error.status === 0;

interface Writing {
  readonly source: ImportSource;
  readonly choices: ImportChoices;
  readonly progress: string;
}

/** A file from being chosen to being written, and taken back: what it would do first, then the doing. */
export function useImport(circleId: string, onWritten: (report: ImportReport) => void) {
  const client = useQueryClient();
  const [source, setSource] = useState<ImportSource | null>(null);
  const [choices, setChoices] = useState(NO_CHOICES);
  const [round, setRound] = useState(0);
  const preview = useMutation({
    mutationFn: (chosen: ImportSource) => {
      // A file that is refused anyway need not travel.
      if (chosen.file.size > IMPORT_MAX_BYTES) throw tooLarge();
      return importTunes(circleId, chosen, { dryRun: true });
    },
  });
  const writing = useMutation({
    mutationFn: ({ source: sent, choices: said, progress }: Writing) =>
      importTunes(circleId, sent, { dryRun: false, progress }, [...said.values()]),
    // The same file under the same id: the server answers what it answered, or goes on.
    retry: (tries, error) => tries < TRIES && isLost(error),
    retryDelay: pauseBefore,
    // Also when the page was left meanwhile.
    onSuccess: async (report) => {
      onWritten(report);
      await client.invalidateQueries({ queryKey: libraryKey(circleId) });
    },
  });
  const error = writing.error ?? preview.error;
  return {
    /** The chosen file; none for pasted words. */
    file: source?.pasted ? null : (source?.file ?? null),
    pasted: source?.pasted ?? false,
    /** Another number for every file, so that its preview begins anew. */
    round,
    /** What the file would do, once read. */
    preview: preview.data,
    reading: preview.isPending,
    choices,
    setChoices,
    /** Under which the writing can be watched; null while nothing is written. */
    progressId: writing.isPending ? writing.variables.progress : null,
    /** Whether the connection broke while it is written; it is asked for again. */
    lost: writing.isPending && writing.failureCount > 0,
    /** What was done. */
    done: writing.data,
    /** What is wrong with the file, or with the sending of it. */
    error: error ? sentenceAt('file', error) : undefined,
    /** Whether the writing failed, and the file was not read wrongly before. */
    failedToWrite: writing.isError,
    choose: (chosen: ImportSource) => {
      setSource(chosen);
      setRound((before) => before + 1);
      setChoices(NO_CHOICES);
      writing.reset();
      preview.mutate(chosen);
    },
    write: () => {
      if (!source || writing.isPending) return;
      // Once more after a failure: what is asked for is still the same.
      const same = writing.isError && writing.variables.choices === choices;
      const progress = same ? writing.variables.progress : newId();
      writing.mutate({ source, choices, progress });
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
