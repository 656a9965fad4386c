import type { Tune } from '@pegwell/shared/contract/tunes';
import styles from './tune-words.module.css';

/** Composer, source and notes; nothing where there are none. */
export function TuneWords({ tune }: { readonly tune: Tune }) {
  const words = [
    { term: 'Composer', text: tune.composer },
    { term: 'Source', text: tune.source },
    { term: 'Notes', text: tune.notes },
  ].filter(({ text }) => text);
  if (words.length === 0) return null;
  return (
    <dl className={styles.words}>
      {words.map(({ term, text }) => (
        <div key={term}>
          <dt>{term}</dt>
          <dd>{text}</dd>
        </div>
      ))}
    </dl>
  );
}
