import { MAX_ACCEPTED } from '@pegwell/shared/contract/tunes';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { useFieldArray, useWatch, type UseFormReturn } from 'react-hook-form';
import { isAny } from '../../../music/read-tuning';
import { Button } from '../../../ui/button';
import { CheckField } from '../../../ui/check-field';
import type { TuneFormValues } from '../tune-form-values';
import { AcceptedField } from './accepted-field';
import styles from './tune-form.module.css';

interface KindTuningsFieldProps {
  readonly form: UseFormReturn<TuneFormValues>;
  readonly kind: InstrumentKind;
  /** Its place in the form's `tunings`. */
  readonly index: number;
  readonly onRemove: () => void;
}

/** One instrument: its accepted tunings in order of choice, or that it plays the tune as it stands. */
export function KindTuningsField({ form, kind, index, onRemove }: KindTuningsFieldProps) {
  const name = `tunings.${index}.accepted` as const;
  const { fields, append, remove, move, replace } = useFieldArray({ control: form.control, name });
  const accepted = useWatch({ control: form.control, name });
  const asItStands = accepted.length === 1 && isAny(accepted[0]?.tuning ?? '');
  const problems = form.formState.errors.tunings?.[index];
  return (
    <div className={styles.stated} role="group" aria-label={kind.name}>
      <div className={styles.head}>
        <span className={styles.kind}>{kind.name}</span>
        <CheckField
          label="plays it as it stands"
          checked={asItStands}
          onChange={(event) => replace([{ tuning: event.target.checked ? 'any' : '', capo: 0 }])}
        />
        <Button look="quiet" onClick={onRemove}>
          Say nothing <span className="visually-hidden">for {kind.name}</span>
        </Button>
      </div>
      {asItStands
        ? null
        : fields.map((field, rank) => (
            <AcceptedField
              key={field.id}
              form={form}
              kind={kind}
              name={`${name}.${rank}`}
              rank={rank}
              onFirst={() => move(rank, 0)}
              {...(fields.length > 1 ? { onRemove: () => remove(rank) } : {})}
            />
          ))}
      {asItStands || fields.length >= MAX_ACCEPTED ? null : (
        <Button look="plain" className={styles.another} onClick={() => append({ tuning: '', capo: 0 })}>
          Accepts another as well
        </Button>
      )}
      <div role="alert" className={styles.problem}>
        {problems?.kind?.message}
        {problems?.accepted?.root?.message ?? problems?.accepted?.message}
      </div>
    </div>
  );
}
