import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { CheckField } from '../../../ui/check-field';
import type { ImportRow } from '../import-rows';
import styles from './import-preview.module.css';

interface FoundChoiceProps {
  readonly row: ImportRow;
  readonly choice: ImportChoice;
  readonly onChoose: (choice: ImportChoice) => void;
}

/** Tunings that a tune's words speak of: each is taken, or left where it was found. */
export function FoundChoice({ row, choice, onChoose }: FoundChoiceProps) {
  return (
    <>
      {row.found?.map(({ kind, tuning, said }) => (
        <CheckField
          key={kind}
          checked={choice.found.includes(kind)}
          onChange={({ target }) => {
            const others = choice.found.filter((other) => other !== kind);
            onChoose({ ...choice, found: target.checked ? [...others, kind] : others });
          }}
          label={
            <>
              <span className="visually-hidden">{`${row.title}: `}</span>
              Take <b className={styles.tuning}>{tuning}</b> for the{' '}
              {builtInKind(kind)?.name.toLowerCase() ?? kind}
              <span className={styles.said}>{`, found in “${said}”`}</span>
            </>
          }
        />
      ))}
    </>
  );
}
