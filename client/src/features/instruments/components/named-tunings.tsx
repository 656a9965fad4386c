import { cautions } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { NAMED_TUNINGS, type NamedTuning } from '@pegwell/shared/music/named-tunings';
import { showTuning } from '@pegwell/shared/music/tuning';
import { retuneWords } from '@pegwell/shared/music/words';
import { Link } from 'react-router-dom';
import { useMedia } from '../../../lib/use-media';
import { retuneAddress } from '../../../music/retune-address';
import { PegStrip } from '../../../pictures/peg-strip';
import { TuningText } from '../../../pictures/tuning-text';
import styles from './named-tunings.module.css';

interface NamedTuningsProps {
  readonly kind: InstrumentKind;
  /** How the strings stand now: every tuning is shown as the turns from there. */
  readonly from: readonly string[];
  /** Whose tunes in a tuning it leads to. */
  readonly circleId: string;
}

/** A kind's named tunings: letters, names and keys, and which pegs lead there. */
export function NamedTunings({ kind, from, circleId }: NamedTuningsProps) {
  return (
    <ul className={styles.tunings}>
      {(NAMED_TUNINGS[kind.id] ?? []).map((named) => (
        <li key={named.pitches.join()}>
          <NamedTuningRow {...{ kind, from, circleId, named }} />
        </li>
      ))}
    </ul>
  );
}

/** `keys` is written as players say it: "D, A mixolydian", "all", "sounds a tone low". */
function keyLine(keys: string): string {
  if (keys === 'all') return 'for every key';
  return keys.startsWith('sounds') ? keys : `for ${keys}`;
}

function NamedTuningRow({
  kind,
  from,
  circleId,
  named,
}: NamedTuningsProps & { readonly named: NamedTuning }) {
  // Six doubled courses in large would not fit beside the words.
  const wide = useMedia('(min-width: 62rem)');
  const { pitches, names, keys, provenance } = named;
  const words = retuneWords(kind, from, pitches);
  const toWatch = cautions(kind, from, pitches);
  return (
    <>
      <div>
        <h3 className={styles.letters}>
          <TuningText text={showTuning(kind, pitches)} />
        </h3>
        {names.length > 0 ? <p className={styles.names}>{names.join(', ')}</p> : null}
        {keys ? <p>{keyLine(keys)}</p> : null}
        <p className={styles.about}>{pitches.join(' ')}</p>
        <p>
          <Link
            to={`/c/${circleId}/tunes?${new URLSearchParams({ kind: kind.id, tuning: showTuning(kind, pitches) }).toString()}`}
          >
            Tunes in it
          </Link>
        </p>
        <p className={styles.about}>{`Source: ${provenance}`}</p>
      </div>
      <div className={styles.strip}>
        <PegStrip
          kind={kind}
          from={from}
          to={pitches}
          size={wide ? 'large' : 'small'}
          whenStill="pegs"
          wordsBeside
        />
      </div>
      <div className={styles.words}>
        <p>{words || 'Nothing to turn'}</p>
        {words ? (
          <p>
            <Link to={retuneAddress(kind, { pitches: from, capo: 0 }, { pitches, capo: 0 })}>Peg by peg</Link>
          </p>
        ) : null}
        {toWatch.map(({ courseIndex, grade, sentence }) => (
          <p
            key={courseIndex}
            className={grade === 'caution' || grade === 'refused' ? styles.caution : styles.about}
          >
            {sentence}
          </p>
        ))}
      </div>
    </>
  );
}
