import type { Session } from '@pegwell/shared/contract/sessions';
import { ownTimeZone, timeZones } from '../../../lib/format';
import { useProblemForm } from '../../../lib/use-problem-form';
import { Button, LinkButton } from '../../../ui/button';
import { FormProblems, SelectField, TextField } from '../../../ui/fields';
import { createEvening } from '../api/evening-list';
import { atFields, newEvening, toCreate, type EveningFormValues } from '../evening-form-values';
import { EveningChairs } from './evening-chairs';
import styles from './evening-form.module.css';

interface EveningFormProps {
  readonly circleId: string;
  /** The circle's clock, by which the evening starts unless another is chosen. */
  readonly timeZone: string;
  readonly onCreated: (evening: Session) => Promise<void> | void;
  readonly back: string;
}

/** Plans a new evening: when, where, and who retunes. The tunes come on its board. */
export function EveningForm({ circleId, timeZone, onCreated, back }: EveningFormProps) {
  const { form, problems, submit, show } = useProblemForm<EveningFormValues>({
    defaultValues: newEvening(timeZone),
  });
  const { register } = form;
  const { errors, isSubmitting } = form.formState;
  const zones = [...new Set([timeZone, ...timeZones()])];
  const filled = (what: string) => (text: string) => text.trim() !== '' || what;
  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (values) => {
        try {
          await onCreated(await createEvening(circleId, toCreate(values)));
        } catch (error) {
          show(atFields(error, values));
        }
      })}
    >
      <TextField
        label="Title"
        placeholder="Second Thursday"
        autoComplete="off"
        error={errors.title?.message}
        {...register('title', { validate: filled('Give the evening a title.') })}
      />
      <div className={styles.when}>
        <TextField
          label="Date"
          type="date"
          error={errors.date?.message}
          {...register('date', { validate: filled('Say the date.') })}
        />
        <TextField
          label="Begins at"
          type="time"
          error={errors.time?.message}
          {...register('time', { validate: filled('Say the time.') })}
        />
        <SelectField label="By the clock of" error={errors.timeZone?.message} {...register('timeZone')}>
          {zones.map((zone) => (
            <option key={zone} value={zone}>
              {zone.replaceAll('_', ' ')}
              {zone === timeZone ? ' (the circle’s)' : zone === ownTimeZone() ? ' (where you are)' : ''}
            </option>
          ))}
        </SelectField>
      </div>
      <TextField
        label="Place"
        placeholder="The boathouse"
        autoComplete="off"
        error={errors.place?.message}
        {...register('place')}
      />
      <EveningChairs form={form} />
      <FormProblems problems={problems} />
      <div className={styles.do}>
        <Button type="submit" busy={isSubmitting && 'Planning'}>
          Plan the evening
        </Button>
        <LinkButton look="quiet" to={back}>
          Leave it
        </LinkButton>
      </div>
    </form>
  );
}
