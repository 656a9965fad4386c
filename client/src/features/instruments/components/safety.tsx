import { DEFERENCE } from '@pegwell/shared/music/caution';
import styles from './safety.module.css';

/** What to heed wherever pegs are turned. */
export function Safety() {
  return (
    <section className={styles.safety} aria-labelledby="safety">
      <h2 id="safety">Before you turn a peg</h2>
      <p>
        A string raised too far, or the wrong peg turned, can break a string and hurt an eye or a hand. Keep
        your face out of the line of the string.
      </p>
      <ol>
        <li>Take the capo off, and a banjo’s fifth string out of its spike.</li>
        <li>
          First the strings that come down: a little under, then up to pitch, one at a time. Never several
          slack at once; the bridge or the soundpost can fall.
        </li>
        <li>Then those that go up, slowly, from below. Push a friction peg in a little while you turn it.</li>
        <li>See that the bridge stands upright, and check all strings again: one moves the others.</li>
      </ol>
      <p>
        <b>{DEFERENCE}</b> Gut strings bear less than steel.
      </p>
    </section>
  );
}
