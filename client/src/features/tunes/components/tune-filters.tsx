import { BUILT_IN_KINDS, builtInKind } from '@pegwell/shared/music/instrument';
import { MODES } from '@pegwell/shared/music/mode';
import { useId, useState } from 'react';
import { useDraft } from '../../../lib/use-draft';
import { TONICS } from '../../../music/key-words';
import { isAny, readTuning } from '../../../music/read-tuning';
import { TuningField } from '../../../music/tuning-field';
import { Button } from '../../../ui/button';
import { SelectField, TextField } from '../../../ui/fields';
import type { TuneFiltersInAddress } from '../hooks/use-tune-filters';
import { RHYTHMS } from '../rhythms';
import styles from './tune-filters.module.css';

interface TuneFiltersProps extends TuneFiltersInAddress {
  /** On a phone all but the search are folded away, and sorting stands with them. */
  readonly narrow: boolean;
  /** What the server says of the tuning, where it was asked for one that it cannot read. */
  readonly tuningError?: string | undefined;
}

/** Find by title, instrument and tuning, key, mode, rhythm; every change stands in the address. */
export function TuneFilters(props: TuneFiltersProps) {
  const { filters, active, change, clear, narrow } = props;
  const [search, typeSearch] = useDraft(filters.search, (text) => change({ search: text }));
  const [open, setOpen] = useState(false);
  const id = useId();
  const folded = narrow && !open;
  const others = active - (filters.search ? 1 : 0);
  return (
    <form className={styles.filters} role="search" onSubmit={(event) => event.preventDefault()}>
      <div className={styles.search}>
        <TextField
          label="Search titles"
          hideLabel
          type="search"
          placeholder="Search titles"
          maxLength={200}
          value={search}
          onChange={(event) => typeSearch(event.target.value)}
        />
      </div>
      {narrow ? (
        <Button look="quiet" aria-expanded={open} aria-controls={id} onClick={() => setOpen(!open)}>
          {others > 0 ? `Filters (${others})` : 'Filters'}
        </Button>
      ) : null}
      <div id={id} className={styles.more} hidden={folded}>
        {folded ? null : <MoreFilters {...props} />}
      </div>
      {active > 0 ? (
        <Button look="plain" onClick={clear}>
          Show all
        </Button>
      ) : null}
    </form>
  );
}

function MoreFilters({ filters, change, narrow, tuningError }: TuneFiltersProps) {
  const kind = builtInKind(filters.kind);
  const rhythms = useId();
  const readable = (text: string) =>
    kind !== undefined && (isAny(text) || readTuning(kind, text).tuned !== null);
  // Half a tuning is no question to the server; the field says what is missing.
  const [tuning, typeTuning] = useDraft(filters.tuning, (text) => {
    if (text === '' || readable(text)) change({ tuning: text });
  });
  const [rhythm, typeRhythm] = useDraft(filters.rhythm, (text) => change({ rhythm: text }));
  return (
    <>
      <SelectField
        label="Instrument"
        value={filters.kind}
        onChange={(event) => change({ kind: event.target.value })}
      >
        <option value="">Any instrument</option>
        {BUILT_IN_KINDS.map(({ id, name }) => (
          <option key={id} value={id}>
            {name}
          </option>
        ))}
      </SelectField>
      {kind ? (
        <div className={styles.tuning}>
          <TuningField
            kind={kind}
            any
            label={`${kind.name} tuning`}
            placeholder="Any tuning"
            text={tuning}
            value={tuning}
            error={tuning === filters.tuning ? tuningError : undefined}
            onChange={(event) => typeTuning(event.target.value)}
          />
        </div>
      ) : null}
      <SelectField label="Key" value={filters.key} onChange={(event) => change({ key: event.target.value })}>
        <option value="">Any key</option>
        {TONICS.map((tonic) => (
          <option key={tonic}>{tonic}</option>
        ))}
      </SelectField>
      <SelectField
        label="Mode"
        value={filters.mode}
        onChange={(event) => change({ mode: event.target.value })}
      >
        <option value="">Any mode</option>
        {MODES.map((mode) => (
          <option key={mode}>{mode}</option>
        ))}
      </SelectField>
      <TextField
        label="Rhythm"
        list={rhythms}
        placeholder="Any rhythm"
        maxLength={40}
        value={rhythm}
        onChange={(event) => typeRhythm(event.target.value)}
      />
      <datalist id={rhythms}>
        {RHYTHMS.map((word) => (
          <option key={word} value={word} />
        ))}
      </datalist>
      {narrow ? (
        <SelectField
          label="Sorted by"
          value={filters.sort}
          onChange={(event) => change({ sort: event.target.value })}
        >
          <option value="title">Title</option>
          <option value="key">Key</option>
          <option value="rhythm">Rhythm</option>
          <option value="-updated">Changed last</option>
        </SelectField>
      ) : null}
    </>
  );
}
