import type { Tune } from '@pegwell/shared/contract/tunes';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import type { ReactNode } from 'react';
import { AcceptedText } from '../../../music/accepted-text';
import { keyWords } from '../../../music/key-words';
import { kindOfTune, kindsOfTunes } from '../tune-kinds';
import styles from './tune-table.module.css';

/** More kinds than these share the last column. */
const OWN_COLUMNS = 3;

interface TuneTableProps {
  readonly tunes: readonly Tune[];
  readonly sort: string;
  readonly onSort: (sort: string) => void;
  /** The title, as a way to the tune. */
  readonly linkTo: (tune: Tune) => ReactNode;
  /** While the next page is on its way the last one stays, fainter. */
  readonly stale: boolean;
}

/** The library on a wide window. Light letters are assumed from the circle's usual tunings. */
export function TuneTable({ tunes, sort, onSort, linkTo, stale }: TuneTableProps) {
  const kinds = kindsOfTunes(tunes);
  const own = kinds.length > OWN_COLUMNS + 1 ? kinds.slice(0, OWN_COLUMNS) : kinds;
  const others = kinds.slice(own.length);
  const heading = { sort, onSort };
  return (
    <table className={styles.table} data-stale={stale || undefined}>
      <caption className="visually-hidden">Tunes of the circle</caption>
      <thead>
        <tr>
          <SortHeading by="title" {...heading}>
            Title
          </SortHeading>
          <SortHeading by="key" {...heading}>
            Key
          </SortHeading>
          <SortHeading by="rhythm" {...heading}>
            Rhythm
          </SortHeading>
          {own.map(({ id, name }) => (
            <th key={id} scope="col">
              {name}
            </th>
          ))}
          {others.length > 0 ? <th scope="col">Others</th> : null}
        </tr>
      </thead>
      <tbody>
        {tunes.map((tune) => (
          <tr key={tune.id}>
            <th scope="row">{linkTo(tune)}</th>
            <td className={styles.key}>{keyWords(tune.key, tune.mode)}</td>
            <td>{tune.rhythm}</td>
            {own.map((kind) => (
              <td key={kind.id} className={styles.tuning}>
                <KindCell tune={tune} kind={kind} />
              </td>
            ))}
            {others.length > 0 ? (
              <td className={styles.others}>
                {others.map((kind) => (
                  <KindCell key={kind.id} tune={tune} kind={kind} named />
                ))}
              </td>
            ) : null}
          </tr>
        ))}
      </tbody>
    </table>
  );
}

interface SortHeadingProps extends Pick<TuneTableProps, 'sort' | 'onSort'> {
  readonly by: string;
  readonly children: string;
}

function SortHeading({ by, sort, onSort, children }: SortHeadingProps) {
  const up = sort === by;
  const down = sort === `-${by}`;
  return (
    <th scope="col" aria-sort={up ? 'ascending' : down ? 'descending' : 'none'}>
      <button type="button" onClick={() => onSort(up ? `-${by}` : by)}>
        {children}
        <svg width="10" height="10" viewBox="0 0 10 10" fill="currentColor" aria-hidden="true">
          {up ? <path d="M5 1.500 9 8H1Z" /> : down ? <path d="M5 8.500 1 2h8Z" /> : null}
        </svg>
      </button>
    </th>
  );
}

interface KindCellProps {
  readonly tune: Tune;
  readonly kind: InstrumentKind;
  readonly named?: boolean;
}

function KindCell({ tune, kind, named = false }: KindCellProps) {
  const row = kindOfTune(tune, kind.id);
  if (!row) return null;
  const text = <AcceptedText accepted={row.accepted} assumed={row.assumed} />;
  return named ? (
    <div>
      <span className={styles.kind}>{kind.name}</span> {text}
    </div>
  ) : (
    text
  );
}
