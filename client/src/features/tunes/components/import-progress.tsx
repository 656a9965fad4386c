import { useQuery } from '@tanstack/react-query';
import { grouped } from '../../../lib/format';
import { ProgressBar } from '../../../ui/progress-bar';
import { getImportProgress } from '../api/import-tunes';

/** Milliseconds between two looks. */
const LOOK = 400;

interface ImportProgressProps {
  readonly circleId: string;
  readonly importId: string;
  /** How many tunes are to be written, as the preview had it, until the server says. */
  readonly expected: number;
  /** Whether the connection broke: it is asked for again by itself. */
  readonly lost: boolean;
}

/** Moves with the rows that are really written. */
export function ImportProgress({ circleId, importId, expected, lost }: ImportProgressProps) {
  const progress = useQuery({
    queryKey: ['import', circleId, importId],
    queryFn: ({ signal }) => getImportProgress(circleId, importId, signal),
    refetchInterval: LOOK,
    // Not there yet while the file travels; the next look asks again anyway.
    retry: false,
    staleTime: 0,
  });
  const total = progress.data?.total ?? expected;
  const written = progress.data?.written ?? 0;
  return (
    <div>
      <ProgressBar
        label="Writing the tunes"
        done={written}
        total={total}
        words={
          progress.data ? `${grouped(written)} of ${grouped(total)} tunes written` : 'Sending the file …'
        }
      />
      <p style={{ marginTop: 8, color: 'var(--ink-2)' }}>
        {lost
          ? 'The connection broke. The import goes on, and this page asks for it again.'
          : 'You can leave this page; the import goes on. All of it is kept, or nothing.'}
      </p>
    </div>
  );
}
