import type { SessionSummary } from '@pegwell/shared/contract/sessions';
import { Link } from 'react-router-dom';
import { count, dayOf, timeOf } from '../../../lib/format';
import { LinkButton } from '../../../ui/button';
import { CopyButton } from '../../../ui/copy-button';
import styles from './evening-rows.module.css';

interface EveningRowsProps {
  readonly circleId: string;
  readonly evenings: readonly SessionSummary[];
  /** The circle's own; an evening by another says so. */
  readonly timeZone: string;
  /** Whether the reader runs evenings. */
  readonly mayRun: boolean;
  readonly past?: boolean;
}

/** Evenings as rows: when and where, what is planned, and the ways into them. */
export function EveningRows({ circleId, evenings, timeZone, mayRun, past = false }: EveningRowsProps) {
  return (
    <ul className={`${styles.rows} ${past ? styles.past : ''}`}>
      {evenings.map((evening) => (
        <li key={evening.id}>
          <div className={styles.words}>
            <p className={styles.when}>
              {evening.status === 'live' ? <b className={styles.live}>Now</b> : null}
              {dayOf(evening.startsAt, evening.timeZone)}
              {', '}
              {timeOf(evening.startsAt, evening.timeZone)}
              {evening.timeZone === timeZone ? null : ` (${evening.timeZone.replaceAll('_', ' ')})`}
            </p>
            <Link className={styles.title} to={`/c/${circleId}/evenings/${evening.id}`}>
              {evening.title}
            </Link>
            <p className={styles.about}>
              {[evening.place, tunesWords(evening, past)].filter(Boolean).join(' · ')}
            </p>
          </div>
          {past ? null : <Ways circleId={circleId} evening={evening} mayRun={mayRun} />}
        </li>
      ))}
    </ul>
  );
}

const tunesWords = ({ tunes, sets }: SessionSummary, past: boolean) =>
  tunes === 0 ? (past ? 'no tunes' : 'no tunes yet') : `${count(tunes, 'tune')} in ${count(sets, 'set')}`;

interface WaysProps extends Pick<EveningRowsProps, 'circleId' | 'mayRun'> {
  readonly evening: SessionSummary;
}

function Ways({ circleId, evening, mayRun }: WaysProps) {
  const { id, code, status } = evening;
  return (
    <div className={styles.ways}>
      <p className={styles.code}>
        <span>Code</span> <b>{code}</b>
      </p>
      <CopyButton text={code} label="Copy the code" what="The code" />
      {status === 'live' ? (
        <LinkButton look={mayRun ? 'outline' : 'solid'} to={`/f/${code}`}>
          Follow
        </LinkButton>
      ) : null}
      {status === 'live' && mayRun ? (
        <LinkButton to={`/c/${circleId}/evenings/${id}/live`}>Run the evening</LinkButton>
      ) : null}
    </div>
  );
}
