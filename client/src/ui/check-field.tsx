import type { ComponentProps, ReactNode } from 'react';
import styles from './check-field.module.css';

interface CheckFieldProps extends Omit<ComponentProps<'input'>, 'type'> {
  readonly label: ReactNode;
}

/** A yes or no with its words beside it; the whole line can be pressed. */
export function CheckField({ label, ...input }: CheckFieldProps) {
  return (
    <label className={styles.check}>
      <input {...input} type="checkbox" />
      <span>{label}</span>
    </label>
  );
}
