import {
  BUILT_IN_KINDS,
  builtInKind,
  standardPitches,
  type InstrumentKind,
} from '@pegwell/shared/music/instrument';
import { showTuning } from '@pegwell/shared/music/tuning';
import { useFieldArray, useWatch, type UseFormReturn } from 'react-hook-form';
import { TuningField } from '../../../music/tuning-field';
import { Button } from '../../../ui/button';
import { SelectField, TextField } from '../../../ui/fields';
import { arrivalProblem, newChair, type EveningFormValues } from '../evening-form-values';
import styles from './evening-form.module.css';

interface EveningChairsProps {
  readonly form: UseFormReturn<EveningFormValues>;
}

/** Who retunes, instrument by instrument, and what they arrive tuned to. */
export function EveningChairs({ form }: EveningChairsProps) {
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'chairs' });
  const free = BUILT_IN_KINDS.filter(({ id }) => !fields.some(({ kind }) => kind === id));
  return (
    <fieldset className={styles.chairs}>
      <legend>Who retunes</legend>
      <p className={styles.hint}>
        Those who stay in one tuning all night do not count: nothing waits for them.
      </p>
      {fields.map((field, index) => {
        const kind = builtInKind(field.kind);
        return kind ? (
          <ChairRow key={field.id} form={form} kind={kind} index={index} onRemove={() => remove(index)} />
        ) : null;
      })}
      {free.length > 0 ? (
        <div className={styles.add}>
          <SelectField
            label="Another instrument that retunes"
            hideLabel
            value=""
            onChange={(event) => append(newChair(event.target.value))}
          >
            <option value="">Another instrument …</option>
            {free.map(({ id, name }) => (
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

interface ChairRowProps extends EveningChairsProps {
  readonly kind: InstrumentKind;
  readonly index: number;
  readonly onRemove: () => void;
}

function ChairRow({ form, kind, index, onRemove }: ChairRowProps) {
  const name = `chairs.${index}` as const;
  const chair = useWatch({ control: form.control, name });
  const errors = form.formState.errors.chairs?.[index];
  return (
    <div className={styles.chair} role="group" aria-label={kind.plural}>
      <TextField
        label={kind.plural}
        type="number"
        inputMode="numeric"
        min={0}
        max={200}
        error={errors?.count?.message ?? errors?.kind?.message}
        {...form.register(`${name}.count`, {
          valueAsNumber: true,
          validate: (count) =>
            (Number.isInteger(count) && count >= 0 && count <= 200) || 'A whole number, 0 to 200.',
        })}
      />
      <SelectField label="Arrive tuned to" {...form.register(`${name}.arrival`)}>
        <option value="standard">{`standard, ${showTuning(kind, standardPitches(kind))}`}</option>
        <option value="first">whatever the first tune wants</option>
        <option value="typed">another tuning</option>
      </SelectField>
      {chair.arrival === 'typed' ? (
        <TuningField
          kind={kind}
          text={chair.tuning}
          label="Which tuning"
          error={errors?.tuning?.message}
          {...form.register(`${name}.tuning`, {
            validate: (_, values) => {
              const row = values.chairs[index];
              return (row && arrivalProblem(row)) ?? true;
            },
          })}
        />
      ) : null}
      <Button look="quiet" onClick={onRemove}>
        Take out <span className="visually-hidden">{kind.plural}</span>
      </Button>
    </div>
  );
}
