import type { CreateRack, Rack, Racks } from '@pegwell/shared/contract/racks';
import { BUILT_IN_KINDS, builtInKind } from '@pegwell/shared/music/instrument';
import { MOST_INSTRUMENTS } from '@pegwell/shared/session/rack';
import { useId } from 'react';
import { useFieldArray, useWatch, type UseFormReturn } from 'react-hook-form';
import { useProblemForm } from '../../../lib/use-problem-form';
import { TuningField } from '../../../music/tuning-field';
import { Button } from '../../../ui/button';
import { Dialog } from '../../../ui/dialog';
import { FormProblems, SelectField, TextField } from '../../../ui/fields';
import {
  newInstrument,
  newRack,
  toSend,
  tuningProblem,
  valuesOf,
  type RackFormValues,
} from '../rack-form-values';
import styles from './rack-dialog.module.css';

interface RackDialogProps {
  readonly evening: Racks['evening'];
  /** Null for a player who is added. */
  readonly rack: Rack | null;
  readonly onSave: (rack: CreateRack) => Promise<unknown>;
  readonly onClose: () => void;
}

/** Who brings which instruments, and how they come. */
export function RackDialog({ evening, rack, onSave, onClose }: RackDialogProps) {
  // Those of the room first.
  const kinds = [
    ...BUILT_IN_KINDS.filter((kind) => evening.kinds.includes(kind.id)),
    ...BUILT_IN_KINDS.filter((kind) => !evening.kinds.includes(kind.id)),
  ];
  const { form, problems, submit } = useProblemForm<RackFormValues>({
    defaultValues: rack ? valuesOf(rack) : newRack(kinds[0]?.id ?? ''),
  });
  const { register, formState } = form;
  const { errors, isSubmitting } = formState;
  const id = useId();
  return (
    <Dialog
      open
      onClose={onClose}
      size="lg"
      title={rack ? `${rack.player}’s instruments` : 'A player with instruments'}
      about="Which to play for which tune, and what to turn when, is worked out from the order on the board."
      actions={
        <>
          <Button type="submit" form={id} busy={isSubmitting && 'Working it out'}>
            {rack ? 'Save' : 'Add and see the plan'}
          </Button>
          <Button look="outline" onClick={onClose}>
            Leave it
          </Button>
        </>
      }
    >
      <form
        id={id}
        className={styles.form}
        noValidate
        onSubmit={submit(async (values) => {
          await onSave(toSend(values));
          onClose();
        })}
      >
        <FormProblems problems={problems} />
        <div className={styles.who}>
          <TextField
            label="Player"
            autoComplete="off"
            error={errors.player?.message}
            {...register('player', { validate: (name) => name.trim() !== '' || 'Say whose they are.' })}
          />
          <SelectField label="Instrument" error={errors.kind?.message} {...register('kind')}>
            {kinds.map(({ id: kindId, name }) => (
              <option key={kindId} value={kindId}>
                {name}
              </option>
            ))}
          </SelectField>
        </div>
        <Instruments form={form} openings={evening.openings} />
      </form>
    </Dialog>
  );
}

interface InstrumentsProps {
  readonly form: UseFormReturn<RackFormValues>;
  readonly openings: Racks['evening']['openings'];
}

function Instruments({ form, openings }: InstrumentsProps) {
  const { control, register, formState } = form;
  const { fields, append, remove } = useFieldArray({ control, name: 'instruments' });
  const { kind: kindId, instruments } = useWatch({ control });
  const kind = builtInKind(kindId ?? '');
  const opening = openings[kindId ?? ''];
  if (!kind) return null;
  const name = kind.name;
  const error = formState.errors.instruments;
  return (
    <fieldset className={styles.instruments}>
      <legend>The instruments they bring</legend>
      {fields.map((field, index) => (
        <div key={field.id} className={styles.row} role="group" aria-label={`${name} ${index + 1}`}>
          <SelectField label={`${name} ${index + 1} comes`} {...register(`instruments.${index}.arrives`)}>
            <option value="opening">
              {opening ? `as everybody arrives, in ${opening}` : 'as everybody: tuned to its first tune'}
            </option>
            <option value="free">tuned to what the plan says</option>
            <option value="tuned">in another tuning</option>
          </SelectField>
          {instruments?.[index]?.arrives === 'tuned' ? (
            <TuningField
              kind={kind}
              text={instruments[index].tuning ?? ''}
              label="Which tuning"
              error={error?.[index]?.tuning?.message}
              {...register(`instruments.${index}.tuning`, {
                validate: (_, values) => {
                  const row = values.instruments[index];
                  return !row || tuningProblem(values.kind, row);
                },
              })}
            />
          ) : null}
          {fields.length > 1 ? (
            <Button look="quiet" onClick={() => remove(index)}>
              Take out <span className="visually-hidden">{`${name} ${index + 1}`}</span>
            </Button>
          ) : null}
        </div>
      ))}
      <Button
        look="plain"
        className={styles.more}
        disabled={fields.length >= MOST_INSTRUMENTS}
        title={
          fields.length >= MOST_INSTRUMENTS
            ? `A plan is worked out for up to ${MOST_INSTRUMENTS}.`
            : undefined
        }
        onClick={() => append(newInstrument('free'))}
      >
        {`One more ${name.toLowerCase()}`}
      </Button>
    </fieldset>
  );
}
