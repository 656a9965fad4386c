import { useId, type ReactNode } from 'react';
import styles from './choice-switch.module.css';

interface ChoiceSwitchProps<T extends string> {
  /** What is chosen between. Read aloud, not shown. */
  readonly legend: string;
  readonly choices: readonly { readonly value: T; readonly label: ReactNode }[];
  readonly value: T;
  readonly onChoose: (value: T) => void;
}

/** One of a few, side by side: radio buttons that look like one thing. */
export function ChoiceSwitch<T extends string>({ legend, choices, value, onChoose }: ChoiceSwitchProps<T>) {
  const name = useId();
  return (
    <fieldset className={styles.choices}>
      <legend className="visually-hidden">{legend}</legend>
      {choices.map((each) => (
        <label key={each.value}>
          <input
            type="radio"
            name={name}
            checked={value === each.value}
            onChange={() => onChoose(each.value)}
          />
          <span>{each.label}</span>
        </label>
      ))}
    </fieldset>
  );
}
