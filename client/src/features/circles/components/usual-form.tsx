import type { UsualTuning } from '@pegwell/shared/contract/circles';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { useFieldArray, useWatch } from 'react-hook-form';
import { ProblemError } from '../../../lib/problem';
import { useProblemForm } from '../../../lib/use-problem-form';
import { isAny, readTuning } from '../../../music/read-tuning';
import { TuningField } from '../../../music/tuning-field';
import { Button } from '../../../ui/button';
import { FormProblems } from '../../../ui/fields';
import { builtInOf, rowsOf, rowsToStore, type UsualRow } from '../usual-rows';
import { AddUsualKey } from './add-usual-key';
import { rowWords } from './usual-table';
import styles from './usual.module.css';

interface UsualFormProps {
  readonly kind: InstrumentKind;
  readonly items: readonly UsualTuning[];
  readonly onSave: (rows: ReturnType<typeof rowsToStore>['rows']) => Promise<void>;
  readonly onLeave: () => void;
}

/** One kind's usual tunings, edited; `any` means that it plays as it stands. */
export function UsualForm({ kind, items, onSave, onLeave }: UsualFormProps) {
  const { form, problems, submit, show } = useProblemForm<{ rows: UsualRow[] }>({
    defaultValues: {
      rows: rowsOf(items, kind.id).map(({ key, family, tuning }) => ({ key, family, tuning })),
    },
  });
  const { fields, append, remove } = useFieldArray({ control: form.control, name: 'rows' });
  const rows = useWatch({ control: form.control, name: 'rows' });
  const { errors, isSubmitting } = form.formState;

  const readable = (text: string) => {
    if (text.trim() === '') return 'Say a tuning, or any.';
    const reading = readTuning(kind, text, { any: true });
    return isAny(text) || reading.tuned !== null || reading.words;
  };

  return (
    <form
      className={styles.form}
      noValidate
      onSubmit={submit(async (values) => {
        const stored = rowsToStore(items, kind.id, values.rows);
        try {
          await onSave(stored.rows);
        } catch (error) {
          show(placed(error, stored.places));
        }
      })}
    >
      <p className={styles.how}>
        Type a tuning with its capo, as <b>{kind.id === 'banjo' ? 'gDGBD capo 2' : 'GDAE'}</b>, or <b>any</b>{' '}
        where nobody retunes for it.
      </p>
      {fields.map((field, index) => {
        const row = rows[index] ?? field;
        const builtIn = builtInOf(kind.id, row);
        const named = row.key === null || builtIn !== builtInOf(kind.id, { key: null, family: null });
        return (
          <div key={field.id} className={styles.edit}>
            <TuningField
              kind={kind}
              any
              text={row.tuning}
              label={rowWords(row)}
              error={errors.rows?.[index]?.tuning?.message}
              {...form.register(`rows.${index}.tuning`, { validate: readable })}
            />
            {named ? (
              row.tuning.trim() === builtIn ? null : (
                <Button look="quiet" onClick={() => form.setValue(`rows.${index}.tuning`, builtIn)}>
                  {`Back to ${builtIn === 'any' ? 'as it stands' : builtIn}`}
                </Button>
              )
            ) : (
              <Button look="quiet" onClick={() => remove(index)}>
                Take out <span className="visually-hidden">{rowWords(row)}</span>
              </Button>
            )}
          </div>
        );
      })}
      <AddUsualKey rows={rows} onAdd={(row) => append({ ...row, tuning: '' })} />
      <FormProblems problems={problems} />
      <div className={styles.do}>
        <Button type="submit" busy={isSubmitting && 'Saving'}>
          Save
        </Button>
        <Button look="quiet" onClick={onLeave}>
          Leave it
        </Button>
      </div>
    </form>
  );
}

/** A refusal of the stored rows, told at the rows of the form. */
function placed(error: unknown, places: readonly number[]): unknown {
  if (!(error instanceof ProblemError)) return error;
  const { status, code, detail, body } = error;
  const errors = error.errors.map(({ path, message }) => ({
    message,
    path: path.replace(/^items\.(\d+)/, (_, place) => `rows.${places.indexOf(Number(place))}`),
  }));
  return new ProblemError({ status, code, detail, body, errors });
}
