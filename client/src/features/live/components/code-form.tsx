import { useState } from 'react';
import { Button } from '../../../ui/button';
import { normalCode } from '../kept-answers';
import styles from './code-form.module.css';

/** Digits and capitals of which no two are mistaken for each other: no 0 and O, no 1, I and L. */
const CODE = /^[2-9A-HJKMNP-Z]{8}$/;

interface CodeFormProps {
  readonly start?: string;
  readonly onCode: (code: string) => void;
}

/** The evening's code, as typed from a sheet or a screen. */
export function CodeForm({ start = '', onCode }: CodeFormProps) {
  const [error, setError] = useState('');
  return (
    <form
      noValidate
      className={styles.form}
      onSubmit={(event) => {
        event.preventDefault();
        const typed = new FormData(event.currentTarget).get('code');
        const code = normalCode(typeof typed === 'string' ? typed : '');
        if (CODE.test(code)) onCode(code);
        else setError(whyNot(code));
      }}
    >
      <label htmlFor="code">Code of the evening</label>
      <input
        id="code"
        name="code"
        defaultValue={start}
        autoComplete="off"
        autoCapitalize="characters"
        autoCorrect="off"
        spellCheck={false}
        aria-invalid={error !== ''}
        aria-describedby="code-error"
        onChange={() => setError('')}
      />
      <p id="code-error" role="alert" className={styles.error}>
        {error}
      </p>
      <Button type="submit" size="large" wide>
        Follow
      </Button>
    </form>
  );
}

function whyNot(code: string): string {
  if (code === '') return 'Type the code that the host shows, or scan it with your camera.';
  const strange = [...code].find((letter) => !/[2-9A-HJKMNP-Z]/.test(letter));
  if (strange) return `A code has no ${strange} in it: no 0 and O, no 1, I and L. Look again.`;
  return `A code has 8 letters and figures; this has ${code.length}.`;
}
