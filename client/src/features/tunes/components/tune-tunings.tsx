import type { Tune } from '@pegwell/shared/contract/tunes';
import { DEFERENCE, cautions } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { standardPitches } from '@pegwell/shared/music/instrument';
import { retuneWords } from '@pegwell/shared/music/words';
import { AcceptedText } from '../../../music/accepted-text';
import { PegStrip } from '../../../pictures/peg-strip';
import { kindOfTune, kindsOfTunes } from '../tune-kinds';
import styles from './tune-tunings.module.css';

/** Per instrument the tunings of a tune, and which pegs they turn from standard, with what to look out for. */
export function TuneTunings({ tune }: { readonly tune: Tune }) {
  const kinds = kindsOfTunes([tune]);
  return (
    <>
      <ul className={styles.kinds}>
        {kinds.map((kind) => {
          const row = kindOfTune(tune, kind.id);
          return row ? (
            <li key={kind.id}>
              <h2>
                {kind.name}
                {row.assumed ? <span className={styles.note}> assumed from the usual tunings</span> : null}
              </h2>
              {row.accepted.map((tuned, rank) => (
                <div key={rank} className={styles.choice}>
                  <p className={styles.letters}>
                    {rank > 0 ? <span className={styles.or}>or </span> : null}
                    <AcceptedText accepted={[tuned]} assumed={row.assumed} />
                  </p>
                  {tuned.pitches ? <FromStandard kind={kind} pitches={tuned.pitches} /> : null}
                </div>
              ))}
            </li>
          ) : null;
        })}
      </ul>
      <p className={styles.defer}>
        Turn slowly, one peg at a time, your face out of the line of the string. {DEFERENCE}
      </p>
    </>
  );
}

interface FromStandardProps {
  readonly kind: InstrumentKind;
  readonly pitches: readonly string[];
}

function FromStandard({ kind, pitches }: FromStandardProps) {
  const standard = standardPitches(kind);
  const words = retuneWords(kind, standard, pitches);
  // A note (up a tone on a wound string) is said on the tunings page; here only what can break a string, or
  // has to be done in two goes.
  const toWatch = cautions(kind, standard, pitches).filter(
    ({ grade, twoGoes }) => grade !== 'note' || twoGoes,
  );
  return (
    <div className={styles.turns}>
      <PegStrip kind={kind} from={standard} to={pitches} whenStill="pegs" wordsBeside />
      <p>{words ? `From standard: ${words}` : 'Standard: nothing to turn'}</p>
      {toWatch.map(({ courseIndex, grade, sentence }) => (
        <p
          key={courseIndex}
          className={grade === 'caution' || grade === 'refused' ? styles.caution : undefined}
        >
          {sentence}
        </p>
      ))}
    </div>
  );
}
