import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { NAMED_TUNINGS } from '@pegwell/shared/music/named-tunings';
import { showTuning } from '@pegwell/shared/music/tuning';
import { useId } from 'react';
import { useDebounced } from '../lib/use-debounced';
import { TextField, type TextFieldProps } from '../ui/fields';
import { isAny, readTuning } from './read-tuning';
import styles from './music.module.css';

interface TuningFieldProps extends Omit<TextFieldProps, 'list'> {
  readonly kind: InstrumentKind;
  /** What stands in the field now, to be read aloud below it. */
  readonly text: string;
  /** Whether `any`, "as it stands", may be typed. */
  readonly any?: boolean;
  /** A capo chosen beside it, 0 for none. */
  readonly capo?: number;
}

/**
 * A tuning as one types it. Below stands what was read: the pegs' pitches and the tuning's name, or what is
 * missing once the typing pauses. The kind's named tunings are offered.
 */
export function TuningField({ kind, text, any = false, capo = 0, error, ...field }: TuningFieldProps) {
  const id = useId();
  return (
    <div>
      <TextField
        autoComplete="off"
        autoCapitalize="off"
        autoCorrect="off"
        spellCheck={false}
        {...field}
        error={error}
        list={`${id}-named`}
        aria-describedby={`${id}-reading`}
      />
      <datalist id={`${id}-named`}>
        {(NAMED_TUNINGS[kind.id] ?? []).map(({ pitches, names }) => (
          <option key={pitches.join()} value={showTuning(kind, pitches)}>
            {names.join(', ')}
          </option>
        ))}
      </datalist>
      {error ? null : <Reading {...{ kind, text, any, capo, id: `${id}-reading` }} />}
    </div>
  );
}

interface ReadingProps {
  readonly kind: InstrumentKind;
  readonly text: string;
  readonly any: boolean;
  readonly capo: number;
  readonly id: string;
}

function Reading({ kind, text, any, capo, id }: ReadingProps) {
  // A refusal waits for a pause: nobody wants to hear of three strings while typing the fourth.
  const still = useDebounced(text, 600);
  const { tuned, words } = readTuning(kind, text, { any, capo });
  const good = tuned !== null || (any && isAny(text));
  const shown = good || still === text ? words : '';
  return (
    <p id={id} role="status" className={styles.reading}>
      <span className={good ? styles.read : styles.refused}>{shown}</span>
    </p>
  );
}
