import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { NAMED_TUNINGS } from '@pegwell/shared/music/named-tunings';
import { retune } from '@pegwell/shared/music/retune';
import { showTuning } from '@pegwell/shared/music/tuning';
import { retuneWords } from '@pegwell/shared/music/words';
import { Link } from 'react-router-dom';
import { retuneAddress } from '../../../music/retune-address';
import { TuningText } from '../../../pictures/tuning-text';
import styles from './tuning-matrix.module.css';

interface TuningMatrixProps {
  readonly kind: InstrumentKind;
}

/** How many pegs turn from each tuning of a kind to each other; every number leads to its retune card. */
export function TuningMatrix({ kind }: TuningMatrixProps) {
  const tunings = (NAMED_TUNINGS[kind.id] ?? []).map(({ pitches }) => ({
    pitches,
    text: showTuning(kind, pitches),
  }));
  if (tunings.length < 3) return null;
  return (
    <section className={styles.matrix} aria-labelledby="matrix">
      <h2 id="matrix">Pegs from one to another</h2>
      <p className={styles.about}>
        From the tuning at the left to the one above. Press a number for the way there.
      </p>
      {/* Wider than a phone: it scrolls in itself, also by keyboard. */}
      <div className={styles.scroll} role="region" aria-labelledby="matrix" tabIndex={0}>
        <table>
          <thead>
            <tr>
              <td />
              {tunings.map(({ text }) => (
                <th key={text} scope="col">
                  <TuningText text={text} />
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {tunings.map((from) => (
              <tr key={from.text}>
                <th scope="row">
                  <TuningText text={from.text} />
                </th>
                {tunings.map((to) => (
                  <Cell key={to.text} kind={kind} from={from.pitches} to={to.pitches} />
                ))}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
    </section>
  );
}

interface CellProps extends TuningMatrixProps {
  readonly from: readonly string[];
  readonly to: readonly string[];
}

function Cell({ kind, from, to }: CellProps) {
  const { pegChanges } = retune(kind, from, to);
  if (pegChanges === 0) return <td className={styles.none}>0</td>;
  return (
    <td data-pegs={Math.min(pegChanges, 4)}>
      <Link
        to={retuneAddress(kind, { pitches: from, capo: 0 }, { pitches: to, capo: 0 })}
        aria-label={`${pegChanges} ${pegChanges === 1 ? 'peg' : 'pegs'}: ${retuneWords(kind, from, to)}`}
      >
        {pegChanges}
      </Link>
    </td>
  );
}
