import type { Follow } from '@pegwell/shared/contract/live';
import { type InstrumentKind, standardPitches } from '@pegwell/shared/music/instrument';
import { retune } from '@pegwell/shared/music/retune';
import { capital, stringLetters, titleOf, turnNow, underTitle, yours } from '../follow-words';
import { StringLetters } from './string-letters';
import { Turns } from './turns';
import styles from './follow.module.css';

interface NowSectionProps {
  readonly now: NonNullable<Follow['now']>;
  readonly kind: InstrumentKind;
  /** Whether the kind retunes with the room: the host waits for it. */
  readonly inRoom: boolean;
  /** A4 of the room, in hertz. */
  readonly referenceA: number;
}

/** The tune that is now, large, and what it asks of this player. */
export function NowSection({ now, kind, inRoom, referenceA }: NowSectionProps) {
  const { phase, retune: move, pitches } = now;
  // The host does not wait for kinds that are not in the room: they have it to turn while others play.
  const turning = move !== null && (phase === 'tuning' || !inRoom);
  return (
    <section className={styles.now} aria-label="Now">
      <p className={styles.small}>{phase === 'tuning' ? 'Coming now' : 'Playing now'}</p>
      <h1 className={styles.title} data-length={lengthOf(titleOf(now))}>
        {titleOf(now)}
      </h1>
      <p className={styles.key}>{underTitle(now)}</p>
      {pitches ? (
        <div className={styles.letters}>
          <StringLetters
            kind={kind}
            pitches={pitches}
            capo={now.capo ?? 0}
            before={turning ? move.fromPitches : null}
          />
        </div>
      ) : null}
      {turning ? (
        <>
          <p className={styles.turn}>{turnNow(move)}</p>
          <Turns {...{ kind, move, referenceA }} when="now" />
        </>
      ) : (
        <Set {...{ now, kind, referenceA }} />
      )}
    </section>
  );
}

/** Nothing to turn, or done already; with a way in for those who come late. */
function Set({ now, kind, referenceA }: Omit<NowSectionProps, 'inRoom'>) {
  const { phase, retune: move, pitches } = now;
  const standard = standardPitches(kind);
  const { pegChanges, deltas } = pitches ? retune(kind, standard, pitches) : { pegChanges: 0, deltas: [] };
  const others = phase === 'tuning' ? ' while the others tune' : '';
  return (
    <>
      <p className={styles.set}>
        {move ? 'The room is in tune.' : `${capital(yours(kind))} is set. Stay as you are${others}.`}
      </p>
      {move ? (
        <details className={styles.more}>
          <summary>Not there yet? What to turn</summary>
          <Turns {...{ kind, move, referenceA }} when="now" />
        </details>
      ) : null}
      {!move && pitches && pegChanges > 0 ? (
        <details className={styles.more}>
          <summary>{`Just come in, tuned to ${stringLetters(kind, standard).join('')}?`}</summary>
          <Turns
            {...{ kind, referenceA }}
            when="now"
            move={{
              deltas: [...deltas],
              pegChanges,
              from: null,
              to: null,
              capoFrom: 0,
              capoTo: now.capo ?? 0,
              fromPitches: [...standard],
              toPitches: pitches,
              gentler: null,
            }}
          />
        </details>
      ) : null}
    </>
  );
}

/** Long titles are set smaller, so that the letters below stay in sight. */
const lengthOf = (title: string): 'short' | 'long' | 'longer' =>
  title.length > 30 ? 'longer' : title.length > 18 ? 'long' : 'short';
