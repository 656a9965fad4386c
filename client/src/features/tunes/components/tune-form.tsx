import { MODES, type Mode } from '@pegwell/shared/music/mode';
import { useId } from 'react';
import { useWatch } from 'react-hook-form';
import { useProblemForm } from '../../../lib/use-problem-form';
import { TONICS } from '../../../music/key-words';
import { Button, LinkButton } from '../../../ui/button';
import { FormProblems, SelectField, TextAreaField, TextField } from '../../../ui/fields';
import { RHYTHMS } from '../rhythms';
import { tuneFormResolver, type TuneFormValues } from '../tune-form-values';
import styles from './tune-form.module.css';
import { TuningsField } from './tunings-field';

/** What the circle takes a kind to have in a key, as shown, or `any`. */
type AssumedFor = (kindId: string, key: string, mode: Mode) => string;

interface TuneFormProps {
  readonly initial: TuneFormValues;
  readonly assumedFor: AssumedFor;
  /** "Save the tune" */
  readonly label: string;
  readonly onSave: (values: TuneFormValues) => Promise<void>;
  /** Where "Leave it" leads. */
  readonly back: string;
}

export function TuneForm({ initial, assumedFor, label, onSave, back }: TuneFormProps) {
  const { form, problems, submit } = useProblemForm<TuneFormValues>({
    resolver: tuneFormResolver,
    defaultValues: initial,
  });
  const { register, control } = form;
  const { errors, isSubmitting } = form.formState;
  const [key, mode] = useWatch({ control, name: ['key', 'mode'] });
  const rhythms = useId();
  // A tonic that is spelled as nobody usually does stays what it is.
  const tonics = TONICS.includes(initial.key) ? TONICS : [initial.key, ...TONICS];
  return (
    <form className={styles.form} noValidate onSubmit={submit(onSave)}>
      <TextField label="Title" autoComplete="off" error={errors.title?.message} {...register('title')} />
      <div className={styles.row}>
        <SelectField label="Key" error={errors.key?.message} {...register('key')}>
          {tonics.map((tonic) => (
            <option key={tonic}>{tonic}</option>
          ))}
        </SelectField>
        <SelectField label="Mode" error={errors.mode?.message} {...register('mode')}>
          {MODES.map((each) => (
            <option key={each}>{each}</option>
          ))}
        </SelectField>
        <TextField
          label="Rhythm"
          placeholder="reel, waltz …"
          autoComplete="off"
          list={rhythms}
          error={errors.rhythm?.message}
          {...register('rhythm')}
        />
        <datalist id={rhythms}>
          {RHYTHMS.map((word) => (
            <option key={word} value={word} />
          ))}
        </datalist>
        <TextField
          label="Parts"
          placeholder="AABB"
          autoComplete="off"
          error={errors.parts?.message}
          {...register('parts')}
        />
      </div>
      <TuningsField form={form} assumedFor={(kindId) => assumedFor(kindId, key, mode)} />
      <div className={styles.pair}>
        <TextField
          label="Composer"
          hint="Empty for a traditional tune."
          autoComplete="off"
          error={errors.composer?.message}
          {...register('composer')}
        />
        <TextField
          label="Source"
          hint="Who or where you have it from."
          autoComplete="off"
          error={errors.source?.message}
          {...register('source')}
        />
      </div>
      <TextAreaField label="Notes" error={errors.notes?.message} {...register('notes')} />
      <FormProblems problems={problems} />
      <div className={styles.do}>
        <Button type="submit" busy={isSubmitting && 'Saving'}>
          {label}
        </Button>
        <LinkButton look="quiet" to={back}>
          Leave it
        </LinkButton>
      </div>
    </form>
  );
}
