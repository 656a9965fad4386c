import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { useId } from 'react';
import { keyWords } from '../../../music/key-words';
import type { ImportRow } from '../import-rows';
import styles from './alike-choice.module.css';

type Alike = NonNullable<ImportRow['alike']>[number];

interface AlikeChoiceProps {
  readonly row: ImportRow;
  readonly choice: ImportChoice;
  readonly onChoose: (choice: ImportChoice) => void;
}

/** A new tune beside those that it is likely the same as, and what becomes of it. */
export function AlikeChoice({ row, choice, onChoose }: AlikeChoiceProps) {
  const name = useId();
  const others = row.alike ?? [];
  const choices: readonly { label: string; said: Pick<ImportChoice, 'alike' | 'with'> }[] = [
    { label: 'Keep both', said: { alike: 'keep' } },
    ...others.map((other) => ({
      label: `Add what is new to ${other.title} (${keyOf(other)})`,
      said: { alike: 'merge' as const, with: placeOf(other) },
    })),
    { label: 'Leave this one out', said: { alike: 'skip' } },
  ];
  return (
    <fieldset className={styles.alike}>
      <legend>
        Likely a tune that is there already<span className="visually-hidden">{`: ${row.title}`}</span>
      </legend>
      <dl className={styles.beside}>
        <Side where="This file" tune={row} />
        {others.map((other) => (
          <Side
            key={placeOf(other)}
            where={other.line === undefined ? 'In the library' : `In line ${other.line}`}
            tune={other}
          />
        ))}
      </dl>
      {choices.map(({ label, said }) => (
        <label key={`${label} ${said.with ?? ''}`} className={styles.choice}>
          <input
            type="radio"
            name={name}
            checked={choice.alike === said.alike && choice.with === said.with}
            onChange={() => onChoose({ line: row.line, found: choice.found, ...said })}
          />
          <span>{label}</span>
        </label>
      ))}
    </fieldset>
  );
}

interface SideProps {
  readonly where: string;
  readonly tune: Pick<ImportRow, 'title' | 'key' | 'mode' | 'tunings'>;
}

function Side({ where, tune }: SideProps) {
  return (
    <div>
      <dt>{where}</dt>
      <dd>
        <b>{tune.title}</b> <span>{keyOf(tune)}</span>
        {tune.tunings?.map(({ kind, tuning }) => (
          <span key={kind} className={styles.stated}>
            {builtInKind(kind)?.name ?? kind} <b className={styles.tuning}>{tuning}</b>
          </span>
        ))}
      </dd>
    </div>
  );
}

const placeOf = ({ id, line = 0 }: Alike): string | number => id ?? line;
const keyOf = ({ key, mode }: SideProps['tune']): string => (key && mode ? keyWords(key, mode) : '');
