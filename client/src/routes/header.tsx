import { Link, NavLink, useMatch } from 'react-router-dom';
import { useMe } from '../features/accounts/hooks/use-me';
import type { Light } from '../theme/light';
import { Mark } from '../ui/mark';
import { AccountMenu } from './account-menu';
import styles from './header.module.css';

/** The pages of a circle, in the order a host needs them. */
const circlePages = [
  { to: 'evenings', label: 'Evenings' },
  { to: 'tunes', label: 'Tunes' },
  { to: 'tunings', label: 'Tunings' },
  { to: 'people', label: 'People' },
  { to: 'record', label: 'Record' },
] as const;

interface HeaderProps {
  readonly light: Light;
  readonly onLight: (light: Light) => void;
}

export function Header({ light, onLight }: HeaderProps) {
  const me = useMe().data;
  const circleId = useMatch('/c/:circleId/*')?.params.circleId;
  const circle = me?.circles.find((one) => one.id === circleId);
  return (
    <header className={styles.bar}>
      <a className={styles.skip} href="#main">
        Skip to the page
      </a>
      <div className={styles.row}>
        <Link className={styles.home} to="/">
          <Mark />
          <span className={circle ? styles.name : undefined}>Pegwell</span>
        </Link>
        {circle ? (
          <nav className={styles.nav} aria-label="Circle">
            <ul>
              {circlePages.map(({ to, label }) => (
                <li key={to}>
                  <NavLink to={`/c/${circle.id}/${to}`}>
                    <span>{label}</span>
                  </NavLink>
                </li>
              ))}
            </ul>
          </nav>
        ) : null}
        <div className={styles.who}>
          {circle ? (
            <span className={styles.circle}>
              {circle.name} · {circle.role}
            </span>
          ) : null}
          <LightSwitch light={light} onLight={onLight} />
          {me ? <AccountMenu me={me} /> : null}
        </div>
      </div>
    </header>
  );
}

/** Day or lamp; shows the one it leads to. */
function LightSwitch({ light, onLight }: HeaderProps) {
  const other = light === 'day' ? 'lamp' : 'day';
  return (
    <button
      type="button"
      className={styles.icon}
      aria-label={`Switch to ${other} light`}
      title={`Switch to ${other} light`}
      onClick={() => onLight(other)}
    >
      <svg
        width="22"
        height="22"
        viewBox="0 0 22 22"
        fill="none"
        stroke="currentColor"
        strokeWidth="1.7"
        aria-hidden="true"
      >
        {other === 'lamp' ? (
          <>
            <path d="M7 3h8l3 8H4z" strokeLinejoin="round" />
            <path d="M11 11v7M7.5 19h7" strokeLinecap="round" />
          </>
        ) : (
          <>
            <circle cx="11" cy="11" r="4" />
            <path
              d="M11 2v2.300M11 17.700V20M2 11h2.300M17.700 11H20M4.600 4.600l1.600 1.600M15.800 15.800l1.600 1.600M4.600 17.400l1.600-1.600M15.800 6.200l1.600-1.600"
              strokeLinecap="round"
            />
          </>
        )}
      </svg>
    </button>
  );
}
