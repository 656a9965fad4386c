import type { ReactNode } from 'react';
import styles from './page.module.css';

interface PageProps {
  /** For reading pages and forms, 720 px; boards and tables take the whole width. */
  readonly narrow?: boolean;
  readonly children: ReactNode;
}

/** The room a page has between the header and its edges. */
export function Page({ narrow = false, children }: PageProps) {
  return <div className={`${styles.page} ${narrow ? styles.narrow : ''}`}>{children}</div>;
}

interface PageHeadingProps {
  readonly title: string;
  /** One quiet line under the title. */
  readonly about?: ReactNode;
  /** Buttons, or figures, at the right. */
  readonly children?: ReactNode;
}

/** The page's one h1; also names the browser's tab. */
export function PageHeading({ title, about, children }: PageHeadingProps) {
  return (
    <div className={styles.heading}>
      <title>{`${title} · Pegwell`}</title>
      <div className={styles.words}>
        <h1>{title}</h1>
        {about ? <p className={styles.about}>{about}</p> : null}
      </div>
      {children ? <div className={styles.actions}>{children}</div> : null}
    </div>
  );
}
