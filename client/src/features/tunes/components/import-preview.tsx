import type { ImportAction, ImportReport } from '@pegwell/shared/contract/tunes';
import { useMemo, useState } from 'react';
import { grouped } from '../../../lib/format';
import { Pager } from '../../../ui/pager';
import { importRows } from '../import-rows';
import styles from './import-preview.module.css';

/** Rows drawn at once: five thousand would make a page that is slow to scroll and to read aloud. */
const ROWS_A_PAGE = 100;

const WORDS: Readonly<Record<ImportAction, { readonly plan: string; readonly done: string }>> = {
  create: { plan: 'new', done: 'added' },
  update: { plan: 'to be changed', done: 'changed' },
  unchanged: { plan: 'unchanged', done: 'unchanged' },
  skip: { plan: 'left out', done: 'left out' },
};

interface ImportPreviewProps {
  readonly report: ImportReport;
  /** `plan` before the import, `done` behind it. */
  readonly tense: 'plan' | 'done';
}

/** A file line by line: what becomes of each tune, and why some are left out. Counts on top are filters. */
export function ImportPreview({ report, tense }: ImportPreviewProps) {
  const { rows, notes } = useMemo(() => importRows(report), [report]);
  // Behind an import what was left out is what there is still to do.
  const [only, setOnly] = useState<ImportAction | null>(
    tense === 'done' && report.skipped > 0 ? 'skip' : null,
  );
  const [page, setPage] = useState(1);
  const counts: readonly (readonly [ImportAction, number])[] = [
    ['create', report.created],
    ['update', report.updated],
    ['unchanged', report.unchanged],
    ['skip', report.skipped],
  ];
  const shown = only ? rows.filter(({ action }) => action === only) : rows;
  const show = (action: ImportAction | null) => {
    setOnly(action);
    setPage(1);
  };
  return (
    <div>
      <div className={styles.counts} role="group" aria-label="Show">
        <button type="button" aria-pressed={only === null} onClick={() => show(null)}>
          <b>{grouped(report.read)}</b> read
        </button>
        {counts.map(([action, number]) => (
          <button
            key={action}
            type="button"
            aria-pressed={only === action}
            data-action={action}
            onClick={() => show(action)}
          >
            <b>{grouped(number)}</b> {WORDS[action][tense]}
          </button>
        ))}
      </div>
      {notes.length > 0 ? (
        <ul className={styles.notes}>
          {notes.map(({ line, message }) => (
            <li key={`${line} ${message}`}>{`Line ${line}: ${message}`}</li>
          ))}
        </ul>
      ) : null}
      {shown.length === 0 ? (
        <p className={styles.none}>None of these.</p>
      ) : (
        <table className={styles.table}>
          <caption className="visually-hidden">The file, line by line</caption>
          <thead>
            <tr>
              <th scope="col">Line</th>
              <th scope="col">Tune</th>
              <th scope="col">What becomes of it</th>
            </tr>
          </thead>
          <tbody>
            {shown.slice((page - 1) * ROWS_A_PAGE, page * ROWS_A_PAGE).map((row) => (
              <tr key={row.line} data-action={row.action}>
                <td className={styles.line}>{row.line}</td>
                <th scope="row">{row.title || 'without a title'}</th>
                <td>
                  <span className={styles.action}>{WORDS[row.action][tense]}</span>
                  {row.reasons.map((reason) => (
                    <span key={reason} className={styles.reason}>
                      {reason}
                    </span>
                  ))}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      )}
      <Pager page={page} pageSize={ROWS_A_PAGE} total={shown.length} what="lines" onPage={setPage} />
    </div>
  );
}
