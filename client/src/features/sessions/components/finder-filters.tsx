import { builtInKind } from '@pegwell/shared/music/instrument';
import { TONICS } from '../../../music/key-words';
import { SelectField, TextField } from '../../../ui/fields';
import styles from './finder.module.css';

export interface FinderFilter {
  readonly key: string;
  readonly kind: string;
  readonly tuning: string;
}

interface FinderFiltersProps {
  readonly filter: FinderFilter;
  readonly onFilter: (filter: FinderFilter) => void;
  /** The kinds in the room. */
  readonly kinds: readonly string[];
  /** Why the tuning cannot be looked for. */
  readonly problem: string | undefined;
}

/** Key, and a tuning of one of the kinds in the room. */
export function FinderFilters({ filter, onFilter, kinds, problem }: FinderFiltersProps) {
  const name = builtInKind(filter.kind)?.name ?? 'Fiddle';
  return (
    <div className={styles.filters}>
      {kinds.length > 1 ? (
        <SelectField
          label="Instrument of the tuning"
          hideLabel
          value={filter.kind}
          onChange={(event) => onFilter({ ...filter, kind: event.target.value })}
        >
          {kinds.map((kind) => (
            <option key={kind} value={kind}>
              {builtInKind(kind)?.name ?? kind}
            </option>
          ))}
        </SelectField>
      ) : null}
      <TextField
        label={`Tuning of the ${name.toLowerCase()}`}
        hideLabel
        placeholder="Tuning"
        autoComplete="off"
        autoCapitalize="off"
        spellCheck={false}
        value={filter.tuning}
        error={problem}
        onChange={(event) => onFilter({ ...filter, tuning: event.target.value })}
      />
      <SelectField
        label="Key"
        hideLabel
        value={filter.key}
        onChange={(event) => onFilter({ ...filter, key: event.target.value })}
      >
        <option value="">Key</option>
        {TONICS.map((tonic) => (
          <option key={tonic}>{tonic}</option>
        ))}
      </SelectField>
    </div>
  );
}
