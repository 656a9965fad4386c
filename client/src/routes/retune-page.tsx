import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning, showTuned } from '@pegwell/shared/music/tuning';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { RetuneCard } from '../features/retune/components/retune-card';
import styles from '../features/retune/components/retune-card.module.css';
import { useOwnStrings, type OwnStrings } from '../features/retune/hooks/use-own-strings';
import { useLight } from '../theme/light';
import { Button } from '../ui/button';
import phone from '../ui/phone.module.css';

/**
 * The retune card of any tuning to any other, on the phone beside the instrument. Everything it needs stands in its
 * address, so that it opens without an account and works without a network once it is there.
 */
export function RetunePage() {
  const [params] = useSearchParams();
  const navigate = useNavigate();
  const [light, onLight] = useLight('phone');
  const [strings, onStrings] = useOwnStrings();
  const kind = builtInKind(params.get('kind') ?? 'fiddle');
  const from = kind && parseTuning(kind, params.get('from') ?? '');
  const to = kind && parseTuning(kind, params.get('to') ?? '');
  const code = /^[A-Z0-9]{8}$/.exec(params.get('code') ?? '')?.[0];
  const evening = code === undefined ? null : `/f/${code}`;

  return (
    <div className={phone.page}>
      <title>
        {kind && from?.ok && to?.ok
          ? `${showTuned(kind, from.value)} to ${showTuned(kind, to.value)} · Pegwell`
          : 'Retune · Pegwell'}
      </title>
      {kind && from?.ok && to?.ok ? (
        <RetuneCard
          key={params.toString()}
          {...{ kind, strings }}
          from={from.value}
          to={to.value}
          referenceA={referenceOf(params.get('a'))}
          onDone={evening === null ? null : () => void navigate(evening)}
        />
      ) : (
        <main className={styles.step}>
          <h1>Which tuning?</h1>
          <p role="alert">{whyNot(kind !== undefined, from, to)}</p>
        </main>
      )}
      <OwnStringsChoice {...{ strings, onStrings }} />
      <nav className={styles.links}>
        <Button look="outline" onClick={() => onLight(light === 'lamp' ? 'day' : 'lamp')}>
          {light === 'lamp' ? 'Day light' : 'Lamp light'}
        </Button>
        {evening === null ? null : <Link to={evening}>Back to the evening</Link>}
      </nav>
    </div>
  );
}

type Read = ReturnType<typeof parseTuning> | undefined;

function whyNot(knowsKind: boolean, from: Read, to: Read): string {
  if (!knowsKind) return 'This address names an instrument that Pegwell does not know.';
  if (from?.ok === false) return `Where the strings stand cannot be read. ${from.reason}`;
  if (to?.ok === false) return `Where the strings are to go cannot be read. ${to.reason}`;
  return 'This address names no tunings.';
}

/** 440 unless the address says another A that rooms tune to. */
function referenceOf(text: string | null): number {
  const hertz = Number(text);
  return hertz >= 415 && hertz <= 466 ? hertz : 440;
}

interface OwnStringsChoiceProps {
  readonly strings: OwnStrings;
  readonly onStrings: (change: Partial<OwnStrings>) => void;
}

function OwnStringsChoice({ strings, onStrings }: OwnStringsChoiceProps) {
  const choice = (name: keyof OwnStrings, words: string) => (
    <label>
      <input
        type="checkbox"
        checked={strings[name]}
        onChange={(event) => onStrings({ [name]: event.target.checked })}
      />
      {words}
    </label>
  );
  return (
    <fieldset className={styles.own}>
      <legend>This instrument</legend>
      {choice('gut', 'Gut strings: warned of sooner')}
      {choice('leftHanded', 'Strung for the left hand')}
      {choice('pureFifths', 'Pure fifths from A')}
    </fieldset>
  );
}
