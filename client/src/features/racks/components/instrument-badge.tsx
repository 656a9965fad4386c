import styles from './racks.module.css';

interface InstrumentBadgeProps {
  /** Counted from 0. */
  readonly instrument: number;
  /** `hand`: play this one; `turn`: turn its pegs; `rest`: it stands. */
  readonly state: 'hand' | 'turn' | 'rest';
  /** "Fiddle" */
  readonly name: string;
}

/** Which of a player's instruments, by the number it keeps all evening. */
export function InstrumentBadge({ instrument, state, name }: InstrumentBadgeProps) {
  return (
    <span className={styles.badge} data-state={state}>
      <span className="visually-hidden">{name} </span>
      {instrument + 1}
    </span>
  );
}
