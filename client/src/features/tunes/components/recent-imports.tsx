import type { RecentImports as Recent } from '@pegwell/shared/contract/tunes';
import { useQuery } from '@tanstack/react-query';
import { grouped, momentOf } from '../../../lib/format';
import { getRecentImports, recentImportsKey } from '../api/import-tunes';
import { ImportUndo } from './import-undo';
import styles from './recent-imports.module.css';

const KINDS: Readonly<Record<Recent['items'][number]['format'], string>> = {
  csv: 'A table',
  abc: 'ABC',
  list: 'A pasted list',
};

interface RecentImportsProps {
  readonly circleId: string;
  readonly timeZone: string;
}

/** What was imported within a day, each to be undone. Nothing where there is none. */
export function RecentImports({ circleId, timeZone }: RecentImportsProps) {
  const recent = useQuery({
    queryKey: recentImportsKey(circleId),
    queryFn: ({ signal }) => getRecentImports(circleId, signal),
    // What was just undone here stays with what it did, until the page is left.
    staleTime: Infinity,
    gcTime: 0,
  });
  if (recent.isError) return <p role="alert">What was imported lately could not be loaded.</p>;
  if (!recent.data || recent.data.items.length === 0) return null;
  return (
    <section>
      <h2>Imported within a day</h2>
      <ul className={styles.imports}>
        {recent.data.items.map(({ id, at, format, created, updated }) => (
          <li key={id}>
            <p>
              <b>{momentOf(at, timeZone)}</b>
              {` ${KINDS[format]}: ${grouped(created)} added, ${grouped(updated)} changed.`}
            </p>
            <ImportUndo circleId={circleId} importId={id} />
          </li>
        ))}
      </ul>
    </section>
  );
}
