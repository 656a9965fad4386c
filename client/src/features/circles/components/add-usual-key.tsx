import { useState } from 'react';
import { TONICS } from '../../../music/key-words';
import { Button } from '../../../ui/button';
import { SelectField } from '../../../ui/fields';
import type { UsualFamily, UsualRow } from '../usual-rows';
import { FAMILY_WORDS } from './usual-table';
import styles from './usual.module.css';

interface AddUsualKeyProps {
  readonly rows: readonly UsualRow[];
  readonly onAdd: (row: Omit<UsualRow, 'tuning'>) => void;
}

/** One more key for the table; keys that stand in it already are not offered. */
export function AddUsualKey({ rows, onAdd }: AddUsualKeyProps) {
  const [family, setFamily] = useState<UsualFamily>('major');
  const free = TONICS.filter((key) => !rows.some((row) => row.key === key && row.family === family));
  const [chosen, choose] = useState('E');
  const key = free.includes(chosen) ? chosen : (free[0] ?? '');
  return (
    <div className={styles.add}>
      <SelectField label="Another key" value={key} onChange={(event) => choose(event.target.value)}>
        {free.map((tonic) => (
          <option key={tonic}>{tonic}</option>
        ))}
      </SelectField>
      <SelectField
        label="Modes"
        value={family}
        onChange={(event) => setFamily(event.target.value === 'minor' ? 'minor' : 'major')}
      >
        {(['major', 'minor'] as const).map((each) => (
          <option key={each} value={each}>
            {FAMILY_WORDS[each]}
          </option>
        ))}
      </SelectField>
      <Button look="outline" onClick={() => onAdd({ key, family })}>
        Add the key
      </Button>
    </div>
  );
}
