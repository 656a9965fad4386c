import { MAX_CAPO } from '@pegwell/shared/contract/tunes';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { standardPitches } from '@pegwell/shared/music/instrument';
import { useWatch, type UseFormReturn } from 'react-hook-form';
import { readTuning } from '../../../music/read-tuning';
import { TuningField } from '../../../music/tuning-field';
import { PegStrip } from '../../../pictures/peg-strip';
import { Button } from '../../../ui/button';
import { SelectField } from '../../../ui/fields';
import type { TuneFormValues } from '../tune-form-values';
import styles from './tune-form.module.css';

/** Nobody puts a capo on these; where a file says one all the same, it is shown. */
const WITHOUT_CAPO: readonly string[] = ['fiddle', 'bass', 'dulcimer'];

interface AcceptedFieldProps {
  readonly form: UseFormReturn<TuneFormValues>;
  readonly kind: InstrumentKind;
  readonly name: `tunings.${number}.accepted.${number}`;
  /** 0 for the first choice. */
  readonly rank: number;
  readonly onFirst: () => void;
  /** Left out where it is the only one: then the whole instrument is unsaid. */
  readonly onRemove?: () => void;
}

/** One accepted tuning as it is typed, with its capo, and the pegs it turns from standard. */
export function AcceptedField({ form, kind, name, rank, onFirst, onRemove }: AcceptedFieldProps) {
  const value = useWatch({ control: form.control, name });
  const { error } = form.getFieldState(`${name}.tuning`, form.formState);
  const { capo } = value;
  const { tuned } = readTuning(kind, value.tuning, { capo });
  const which = rank === 0 ? 'first choice' : `choice ${rank + 1}`;
  return (
    <div className={styles.accepted}>
      <TuningField
        kind={kind}
        text={value.tuning}
        capo={capo}
        label={rank === 0 ? 'First choice' : 'Or'}
        aria-label={`${kind.name} tuning, ${which}`}
        error={error?.message}
        {...form.register(`${name}.tuning`)}
      />
      {WITHOUT_CAPO.includes(kind.id) && capo === 0 ? null : (
        <div className={styles.capo}>
          <SelectField label="Capo" {...form.register(`${name}.capo`, { valueAsNumber: true })}>
            <option value={0}>none</option>
            {Array.from({ length: MAX_CAPO }, (_, fret) => (
              <option key={fret} value={fret + 1}>
                {fret + 1}
              </option>
            ))}
          </SelectField>
        </div>
      )}
      <div className={styles.strip}>
        {tuned ? (
          <PegStrip
            kind={kind}
            from={standardPitches(kind)}
            to={tuned.pitches}
            whenStill="pegs"
            wordsBeside
          />
        ) : null}
      </div>
      <div className={styles.rowActions}>
        {rank > 0 ? (
          <Button look="plain" onClick={onFirst}>
            Make it the first
          </Button>
        ) : null}
        {onRemove ? (
          <Button look="quiet" onClick={onRemove}>
            Take out <span className="visually-hidden">{which}</span>
          </Button>
        ) : null}
      </div>
    </div>
  );
}
