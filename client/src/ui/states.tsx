import type { ReactNode } from 'react';
import { ProblemError, sentenceOf } from '../lib/problem';
import { Button } from './button';
import styles from './page.module.css';

interface EmptyStateProps {
  readonly title: string;
  /** What to do first, in a sentence. */
  readonly children: ReactNode;
  /** The button that does it. */
  readonly action?: ReactNode;
}

export function EmptyState({ title, children, action }: EmptyStateProps) {
  return (
    <section className={styles.state}>
      <h2>{title}</h2>
      <p>{children}</p>
      {action ? <div className={styles.do}>{action}</div> : null}
    </section>
  );
}

interface LoadingProps {
  /** What is on its way: "the tunes". Read aloud, not shown. */
  readonly what: string;
}

/** Strings that have not been tuned yet: four quiet lines in place of what is to come. */
export function Loading({ what }: LoadingProps) {
  return (
    <div role="status">
      <span className="visually-hidden">{`Loading ${what} …`}</span>
      <div className={styles.lines} aria-hidden="true">
        <span className={styles.line} />
        <span className={styles.line} />
        <span className={styles.line} />
        <span className={styles.line} />
      </div>
    </div>
  );
}

interface FailingProps {
  /** What could not be shown: "The tunes could not be loaded". */
  readonly title: string;
  readonly error: unknown;
  readonly onRetry?: () => void;
  /** `h1` where it stands for the whole page. */
  readonly heading?: 'h1' | 'h2';
  readonly children?: ReactNode;
}

/** A part of a page that failed: what, why in a sentence, and a way on. */
export function Failing({ title, error, onRetry, heading: Heading = 'h2', children }: FailingProps) {
  const gone = error instanceof ProblemError && error.status === 404;
  return (
    <section className={`${styles.state} ${styles.failing}`} role="alert">
      <Heading>{title}</Heading>
      <p className={styles.cause}>{sentenceOf(error)}</p>
      <div className={styles.do}>
        {onRetry && !gone ? (
          <Button look="outline" onClick={onRetry}>
            Try again
          </Button>
        ) : null}
        {children}
      </div>
    </section>
  );
}
