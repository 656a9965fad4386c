import type { UsualTuning } from '@pegwell/shared/contract/circles';
import { AcceptedText } from '../../../music/accepted-text';
import { rowsOf, type UsualFamily } from '../usual-rows';
import styles from './usual.module.css';

/** Which modes a row of the table serves. */
export const FAMILY_WORDS: Readonly<Record<UsualFamily, string>> = {
  major: 'major, mixolydian',
  minor: 'minor, dorian, modal',
};

export const rowWords = ({ key, family }: Pick<UsualTuning, 'key' | 'family'>): string =>
  key === null || family === null ? 'every other key' : `${key} ${FAMILY_WORDS[family]}`;

interface UsualTableProps {
  readonly items: readonly UsualTuning[];
  readonly kindId: string;
}

/** What one kind is taken to be tuned to, key by key; the circle's own rows are marked. */
export function UsualTable({ items, kindId }: UsualTableProps) {
  const rows = rowsOf(items, kindId);
  const only = rows.length === 1;
  return (
    <ul className={styles.rows}>
      {rows.map((row) => (
        <li key={`${row.key} ${row.family}`}>
          <span>{only ? 'in every key' : `in ${rowWords(row)}`}</span>
          <span className={styles.letters}>
            <AcceptedText accepted={[{ tuning: row.tuning, capo: 0 }]} />
          </span>
          <span className={styles.own}>{row.own ? 'your circle’s own' : null}</span>
        </li>
      ))}
    </ul>
  );
}
