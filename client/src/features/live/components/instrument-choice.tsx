import { BUILT_IN_KINDS, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { kindsInRoom } from '../follow-words';
import styles from './instrument-choice.module.css';

interface InstrumentChoiceProps {
  /** Kinds that retune in this room, by id; empty while it is not known. */
  readonly inRoom: readonly string[];
  readonly chosen: InstrumentKind | null;
  readonly onChoose: (kind: InstrumentKind) => void;
}

/** What do you play? Those of this room first. */
export function InstrumentChoice({ inRoom, chosen, onChoose }: InstrumentChoiceProps) {
  const here = kindsInRoom(inRoom);
  const others = BUILT_IN_KINDS.filter((kind) => !here.includes(kind));
  return (
    <section className={styles.choice}>
      <h1>What do you play?</h1>
      <p>This phone keeps your answer. You can change it at the foot of the page.</p>
      <Kinds kinds={here} {...{ chosen, onChoose }} look={styles.here} />
      {here.length > 0 ? <h2>Something else</h2> : null}
      <Kinds kinds={others} {...{ chosen, onChoose }} look={styles.other} />
    </section>
  );
}

interface KindsProps extends Pick<InstrumentChoiceProps, 'chosen' | 'onChoose'> {
  readonly kinds: readonly InstrumentKind[];
  readonly look: string | undefined;
}

function Kinds({ kinds, chosen, onChoose, look }: KindsProps) {
  if (kinds.length === 0) return null;
  return (
    <ul className={look}>
      {kinds.map((kind) => (
        <li key={kind.id}>
          <button type="button" aria-pressed={kind.id === chosen?.id} onClick={() => onChoose(kind)}>
            {kind.name}
          </button>
        </li>
      ))}
    </ul>
  );
}
