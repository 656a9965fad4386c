import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { EntryPicture } from './entry-picture';
import styles from './entry.module.css';

interface EntryProps {
  readonly title: string;
  readonly form: ReactNode;
  readonly other: { readonly words: string; readonly link: string; readonly to: string };
}

/** What Pegwell is for at the left, the way in at the right. */
export function Entry({ title, form, other }: EntryProps) {
  return (
    <div className={styles.entry}>
      <title>{`${title} · Pegwell`}</title>
      <div>
        <p className={styles.line}>
          Play more, <br />
          tune less.
        </p>
        <p className={styles.why}>
          Plan the evening around its tunings: what to play, in which order, and which peg to turn when.
          Everyone in the room follows on the phone.
        </p>
        <EntryPicture />
      </div>
      <div className={styles.form}>
        <h1>{title}</h1>
        {form}
        <p className={styles.other}>
          {other.words} <Link to={other.to}>{other.link}</Link>
          <br />
          Have a code from the host? <Link to="/f">Follow the evening</Link>
        </p>
      </div>
    </div>
  );
}
