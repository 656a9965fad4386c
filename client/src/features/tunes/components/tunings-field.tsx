import { BUILT_IN_KINDS, builtInKind } from '@pegwell/shared/music/instrument';
import { useFieldArray, useWatch, type UseFormReturn } from 'react-hook-form';
import { TuningText } from '../../../pictures/tuning-text';
import { Button } from '../../../ui/button';
import { SelectField } from '../../../ui/fields';
import type { TuneFormValues } from '../tune-form-values';
import { KindTuningsField } from './kind-tunings-field';
import styles from './tune-form.module.css';

interface TuningsFieldProps {
  readonly form: UseFormReturn<TuneFormValues>;
  /** For the key and mode as they stand in the form now. */
  readonly assumedFor: (kindId: string) => string;
}

/** Per instrument what the tune accepts; below, what is assumed where nothing is said. */
export function TuningsField({ form, assumedFor }: TuningsFieldProps) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'tunings' });
  const stated = useWatch({ control: form.control, name: 'tunings' });
  const unsaid = BUILT_IN_KINDS.filter(({ id }) => !stated.some(({ kind }) => kind === id));
  const assumed = unsaid.filter(({ id }) => assumedFor(id) !== 'any');
  const silent = unsaid.filter(({ id }) => assumedFor(id) === 'any');
  const state = (kind: string) =>
    append(
      { kind, accepted: [{ tuning: '', capo: 0 }] },
      { focusName: `tunings.${fields.length}.accepted.0.tuning` },
    );
  return (
    <fieldset className={styles.tunings}>
      <legend>Tunings</legend>
      {fields.map((field, index) => {
        const kind = builtInKind(field.kind);
        return kind ? (
          <KindTuningsField
            key={field.id}
            form={form}
            kind={kind}
            index={index}
            onRemove={() => remove(index)}
          />
        ) : null;
      })}
      {assumed.map(({ id, name }) => (
        <div key={id} className={styles.assumed}>
          <span className={styles.kind}>{name}</span>
          <span>
            assumed <TuningText text={assumedFor(id)} className={styles.light} />
          </span>
          <Button look="plain" onClick={() => state(id)}>
            Say its tuning <span className="visually-hidden">for {name}</span>
          </Button>
        </div>
      ))}
      {silent.length > 0 ? (
        <div className={styles.add}>
          <SelectField
            label="Say a tuning for another instrument"
            hideLabel
            value=""
            onChange={(event) => state(event.target.value)}
          >
            <option value="">Another instrument …</option>
            {silent.map(({ id, name }) => (
              <option key={id} value={id}>
                {name}
              </option>
            ))}
          </SelectField>
        </div>
      ) : null}
    </fieldset>
  );
}
