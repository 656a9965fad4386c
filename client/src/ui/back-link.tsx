import { Link } from 'react-router-dom';
import styles from './back-link.module.css';

interface BackLinkProps {
  readonly to: string;
  /** Where it leads: "Tunes". */
  readonly children: string;
}

/** One step up, above a page's title. */
export function BackLink({ to, children }: BackLinkProps) {
  return (
    <Link to={to} className={styles.back}>
      <svg
        width="9"
        height="14"
        viewBox="0 0 9 14"
        fill="none"
        stroke="currentColor"
        strokeWidth="2"
        aria-hidden="true"
      >
        <path d="M7.500 1.500 2 7l5.500 5.500" strokeLinecap="round" strokeLinejoin="round" />
      </svg>
      {children}
    </Link>
  );
}
