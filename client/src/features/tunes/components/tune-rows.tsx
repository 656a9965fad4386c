import type { Tune } from '@pegwell/shared/contract/tunes';
import type { ReactNode } from 'react';
import { AcceptedText } from '../../../music/accepted-text';
import { keyWords } from '../../../music/key-words';
import { kindOfTune, kindsOfTunes } from '../tune-kinds';
import styles from './tune-table.module.css';

interface TuneRowsProps {
  readonly tunes: readonly Tune[];
  readonly linkTo: (tune: Tune) => ReactNode;
  readonly stale: boolean;
}

/** The library on a phone: a tune a row. Light letters are assumed from the circle's usual tunings. */
export function TuneRows({ tunes, linkTo, stale }: TuneRowsProps) {
  return (
    <ul className={styles.rows} data-stale={stale || undefined}>
      {tunes.map((tune) => (
        <li key={tune.id}>
          {linkTo(tune)}
          <p className={styles.about}>
            {[keyWords(tune.key, tune.mode), tune.rhythm].filter(Boolean).join(' · ')}
          </p>
          <dl className={styles.kinds}>
            {kindsOfTunes([tune]).map((kind) => {
              const row = kindOfTune(tune, kind.id);
              return row ? (
                <div key={kind.id}>
                  <dt>{kind.name}</dt>
                  <dd>
                    <AcceptedText accepted={row.accepted} assumed={row.assumed} />
                  </dd>
                </div>
              ) : null;
            })}
          </dl>
        </li>
      ))}
    </ul>
  );
}
