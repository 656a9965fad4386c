import { Component } from 'react';
import type { ErrorInfo, ReactNode } from 'react';
import { Button } from './button';
import styles from './page.module.css';

interface Props {
  /** A new value clears the failure: pass the page's address. */
  readonly resetKey: string;
  readonly children: ReactNode;
}

interface State {
  readonly error: unknown;
  readonly resetKey: string;
}

/** Catches what a page throws, so that the header and the way to other pages stay. */
export class ErrorBoundary extends Component<Props, State> {
  override state: State = { error: null, resetKey: this.props.resetKey };

  static getDerivedStateFromError(error: unknown): Partial<State> {
    return { error };
  }

  static getDerivedStateFromProps(props: Props, state: State): Partial<State> | null {
    return props.resetKey === state.resetKey ? null : { error: null, resetKey: props.resetKey };
  }

  override componentDidCatch(error: unknown, info: ErrorInfo): void {
    // For whoever looks into it: the browser's console is the only log a page has.
    // eslint-disable-next-line no-console
    console.error(error, info.componentStack);
  }

  override render(): ReactNode {
    if (this.state.error === null) return this.props.children;
    // After a new version is put up, the pieces an open page asks for may be gone.
    const missingPiece = /import|module|chunk/i.test(
      this.state.error instanceof Error ? this.state.error.message : '',
    );
    return (
      <section className={`${styles.page} ${styles.narrow}`} role="alert">
        <div className={`${styles.state} ${styles.failing}`}>
          <h1>{missingPiece ? 'This page could not be loaded' : 'This page stopped'}</h1>
          <p className={styles.cause}>
            {missingPiece
              ? 'The connection was lost, or a newer Pegwell is there. Load the page again.'
              : 'The fault is ours. What was saved is safe. Load the page again.'}
          </p>
          <div className={styles.do}>
            <Button look="outline" onClick={() => location.reload()}>
              Load again
            </Button>
          </div>
        </div>
      </section>
    );
  }
}
