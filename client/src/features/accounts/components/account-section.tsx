import { useId } from 'react';
import type { ReactNode } from 'react';
import styles from './account-section.module.css';

interface AccountSectionProps {
  readonly title: string;
  /** A sentence under the title. */
  readonly about?: ReactNode;
  readonly children: ReactNode;
}

/** One matter of the account page. */
export function AccountSection({ title, about, children }: AccountSectionProps) {
  const heading = useId();
  return (
    <section className={styles.section} aria-labelledby={heading}>
      <h2 id={heading}>{title}</h2>
      {about ? <p className={styles.about}>{about}</p> : null}
      {children}
    </section>
  );
}
