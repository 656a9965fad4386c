import type { ImportAction, ImportReport } from '@pegwell/shared/contract/tunes';
import { Fragment, useMemo, useState } from 'react';
import { grouped } from '../../../lib/format';
import { Button } from '../../../ui/button';
import { Pager } from '../../../ui/pager';
import { choiceOf, choose, countFound, takeAllFound, type ImportChoices } from '../import-choices';
import { importRows, type ImportRow } from '../import-rows';
import { AlikeChoice } from './alike-choice';
import { FoundChoice } from './found-choice';
import styles from './import-preview.module.css';

/** Rows drawn at once: five thousand would make a page that is slow to scroll and to read aloud. */
const ROWS_A_PAGE = 100;

const WORDS: Readonly<Record<ImportAction, { readonly plan: string; readonly done: string }>> = {
  create: { plan: 'new', done: 'added' },
  update: { plan: 'to be changed', done: 'changed' },
  unchanged: { plan: 'unchanged', done: 'unchanged' },
  skip: { plan: 'left out', done: 'left out' },
};

/** What rows are looked at: those of one action, or those that leave something to choose. */
type Shown = ImportAction | 'found' | 'alike';

interface ImportPreviewProps {
  readonly report: ImportReport;
  /** `plan` before the import, `done` behind it. */
  readonly tense: 'plan' | 'done';
  readonly choices: ImportChoices;
  /** Absent where nothing can be chosen any more. */
  readonly onChoose?: (choices: ImportChoices) => void;
}

/**
 * A file line by line: what becomes of each tune, why some are left out, and what there is to choose. Counts on top
 * are filters.
 */
export function ImportPreview({ report, tense, choices, onChoose }: ImportPreviewProps) {
  const { rows, notes } = useMemo(() => importRows(report), [report]);
  // Behind an import what was left out is what there is still to do.
  const [only, setOnly] = useState<Shown | null>(tense === 'done' && report.skipped > 0 ? 'skip' : null);
  const [page, setPage] = useState(1);
  const counts: readonly (readonly [ImportAction, number])[] = [
    ['create', report.created],
    ['update', report.updated],
    ['unchanged', report.unchanged],
    ['skip', report.skipped],
  ];
  const shown = only ? rows.filter((row) => isShown(row, only)) : rows;
  const { found, taken } = countFound(choices, report);
  const alike = rows.filter((row) => isShown(row, 'alike')).length;
  const show = (what: Shown | null) => {
    setOnly(what);
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
        {onChoose && found > 0 ? (
          <button type="button" aria-pressed={only === 'found'} onClick={() => show('found')}>
            <b>{grouped(found)}</b> {found === 1 ? 'tuning found' : 'tunings found'}
          </button>
        ) : null}
        {onChoose && alike > 0 ? (
          <button type="button" aria-pressed={only === 'alike'} onClick={() => show('alike')}>
            <b>{grouped(alike)}</b> likely there already
          </button>
        ) : null}
      </div>
      {onChoose && found > 0 ? (
        <div className={styles.found}>
          <p>
            Tunings that stand in titles or notes are not taken unless you say so.{' '}
            {`${grouped(taken)} of ${grouped(found)} taken.`}
          </p>
          <Button look="outline" onClick={() => onChoose(takeAllFound(choices, report, taken < found))}>
            {taken < found ? 'Take all that were found' : 'Take none of them'}
          </Button>
        </div>
      ) : null}
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
              <Fragment key={row.line}>
                <tr data-action={row.action}>
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
                {onChoose && (row.found || row.alike) ? (
                  <tr className={styles.choices}>
                    <td />
                    <td colSpan={2}>
                      <Choices row={row} choices={choices} onChoose={onChoose} />
                    </td>
                  </tr>
                ) : null}
              </Fragment>
            ))}
          </tbody>
        </table>
      )}
      <Pager page={page} pageSize={ROWS_A_PAGE} total={shown.length} what="lines" onPage={setPage} />
    </div>
  );
}

interface ChoicesProps {
  readonly row: ImportRow;
  readonly choices: ImportChoices;
  readonly onChoose: (choices: ImportChoices) => void;
}

function Choices({ row, choices, onChoose }: ChoicesProps) {
  const said = { row, choice: choiceOf(choices, row.line) };
  return (
    <>
      {row.found ? <FoundChoice {...said} onChoose={(choice) => onChoose(choose(choices, choice))} /> : null}
      {row.alike ? <AlikeChoice {...said} onChoose={(choice) => onChoose(choose(choices, choice))} /> : null}
    </>
  );
}

function isShown(row: ImportRow, what: Shown): boolean {
  if (what === 'found') return row.found !== undefined;
  return what === 'alike' ? row.alike !== undefined : row.action === what;
}
