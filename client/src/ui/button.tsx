import type { ComponentProps } from 'react';
import { Link } from 'react-router-dom';
import type { LinkProps } from 'react-router-dom';
import styles from './button.module.css';

/** `solid` is the one thing to do here; `plain` stands in rows; `danger` takes away. */
export type ButtonLook = 'solid' | 'outline' | 'plain' | 'quiet' | 'danger';

interface Looks {
  readonly look?: ButtonLook;
  readonly size?: 'medium' | 'large';
  /** As wide as what holds it. */
  readonly wide?: boolean;
}

export interface ButtonProps extends ComponentProps<'button'>, Looks {
  /** What to say while the work runs ("Saving"); the button then takes no presses and keeps focus. */
  readonly busy?: string | false | null;
}

function classes({ look = 'solid', size, wide }: Looks, more?: string): string {
  return [styles.button, styles[look], size === 'large' && styles.large, wide && styles.wide, more]
    .filter(Boolean)
    .join(' ');
}

/**
 * A button that can be read with reasons: `disabled` keeps it in the tab order (aria-disabled), so
 * that a keyboard or screen reader finds it and what it says about why.
 */
export function Button({
  look,
  size,
  wide,
  busy,
  disabled,
  className,
  onClick,
  children,
  ...rest
}: ButtonProps) {
  const still = Boolean(busy) || disabled === true;
  return (
    <button
      type="button"
      {...rest}
      className={classes({ look, size, wide }, className)}
      aria-disabled={still || undefined}
      aria-busy={Boolean(busy) || undefined}
      onClick={(event) => {
        if (still) event.preventDefault();
        else onClick?.(event);
      }}
    >
      {busy ? `${busy} …` : children}
    </button>
  );
}

/** A place to go to that looks like a button. Goes without loading the page anew. */
export function LinkButton({ look, size, wide, className, ...rest }: LinkProps & Looks) {
  return <Link {...rest} className={classes({ look, size, wide }, className)} />;
}

/** A file to save or a page elsewhere that looks like a button. */
export function ButtonAnchor({ look, size, wide, className, ...rest }: ComponentProps<'a'> & Looks) {
  return <a {...rest} className={classes({ look, size, wide }, className)} />;
}
