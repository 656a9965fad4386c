import styles from './progress-bar.module.css';

interface ProgressBarProps {
  /** What is under way: "Writing tunes". */
  readonly label: string;
  readonly done: number;
  /** Null while it is not known how much there is to do. */
  readonly total: number | null;
  /** How far it is, in words: "312 of 2,000 tunes". */
  readonly words: string;
}

/** A bar that moves with what was really done, and says the same in words. */
export function ProgressBar({ label, done, total, words }: ProgressBarProps) {
  const part = total === null ? 0 : total === 0 ? 1 : Math.min(1, done / total);
  return (
    <div className={styles.progress}>
      <div
        className={styles.track}
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={total ?? 100}
        {...(total === null ? {} : { 'aria-valuenow': done })}
        aria-valuetext={words}
      >
        <div className={styles.bar} style={{ transform: `scaleX(${part})` }} />
      </div>
      <p>{words}</p>
    </div>
  );
}
