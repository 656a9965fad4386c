import styles from './tuning-text.module.css';

const WITH_CAPO = /^(.*?)(?: capo (\d+))?$/;
const NOTE = /([A-Ga-g])(##?|bb?)?(\d*)/g;
const SIGNS: Readonly<Record<string, string>> = {
  '#': 'sharp',
  '##': 'double sharp',
  b: 'flat',
  bb: 'double flat',
};

/** A tuning for a voice: `AEAC#` is "A E A C sharp", `gDGBD capo 2` "g D G B D, capo 2". */
export function spokenTuning(text: string): string {
  const [, letters = text, capo] = WITH_CAPO.exec(text) ?? [];
  const notes =
    letters === 'any'
      ? [letters]
      : [...letters.matchAll(NOTE)].map(([, letter, sign, octave]) =>
          [letter, sign && SIGNS[sign], octave].filter(Boolean).join(' '),
        );
  return `${notes.join(inFull(letters) ? ', ' : ' ')}${capo ? `, capo ${capo}` : ''}`;
}

/** Pitches with their octaves, or a word, rather than a short name. */
const inFull = (letters: string) => /\d/.test(letters) || letters === 'any';

interface TuningTextProps {
  /** As shown everywhere: `AEAE`, `gDGBD capo 2`, or in full `A3 E4 A4 E5`. */
  readonly text: string;
  readonly className?: string;
}

/** A tuning in the heavy, widely set letters that line up under each other. Takes its size from around. */
export function TuningText({ text, className = '' }: TuningTextProps) {
  const [, letters = text, capo] = WITH_CAPO.exec(text) ?? [];
  return (
    <span className={`${styles.tuning} ${className}`} role="img" aria-label={spokenTuning(text)}>
      <span className={inFull(letters) ? styles.full : styles.letters}>{letters}</span>
      {capo ? <span className={styles.capo}> capo {capo}</span> : null}
    </span>
  );
}
