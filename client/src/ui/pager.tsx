import { Button } from './button';
import styles from './pager.module.css';

interface PagerProps {
  /** Counted from 1. */
  readonly page: number;
  readonly pageSize: number;
  readonly total: number;
  /** What is counted, in the plural: "tunes". */
  readonly what: string;
  readonly onPage: (page: number) => void;
}

/** Which part of a long list is shown, and the way to the rest. Nothing where it all fits on one page. */
export function Pager({ page, pageSize, total, what, onPage }: PagerProps) {
  const last = Math.max(1, Math.ceil(total / pageSize));
  if (total <= pageSize && page === 1) return null;
  const from = Math.min((page - 1) * pageSize + 1, total);
  return (
    <nav className={styles.pager} aria-label={`Pages of ${what}`}>
      <Button look="outline" disabled={page <= 1} onClick={() => onPage(page - 1)}>
        Previous
      </Button>
      <span aria-live="polite">{`${from} to ${Math.min(page * pageSize, total)} of ${total} ${what}`}</span>
      <Button look="outline" disabled={page >= last} onClick={() => onPage(Math.min(page + 1, last))}>
        Next
      </Button>
    </nav>
  );
}
