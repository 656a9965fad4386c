import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import type { Tuned } from '@pegwell/shared/music/tuning';
import type { Scored } from '@pegwell/shared/session/evening';
import { scoreEvening } from '@pegwell/shared/session/score';
import { count } from '../lib/format';
import { StringLanes } from '../pictures/string-lanes';
import styles from './entry.module.css';

/*
 * What a better order does, shown with the real picture and the real score: the same five tunes on one
 * fiddle, as they were called and as few pegs as can be.
 */
const asCalled = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'];
const better = ['GDAE', 'GDAE', 'ADAE', 'AEAE', 'AEAE'];

const fiddle = builtInKind('fiddle');

function tuned(text: string): Tuned {
  const parsed = fiddle && parseTuning(fiddle, text);
  if (!parsed?.ok) throw new Error(`${text} is no fiddle tuning`);
  return parsed.value;
}

function evening(tunings: readonly string[]) {
  const chairs = fiddle ? [{ kind: fiddle, count: 1 }] : [];
  const entries = tunings.map((tuning, index) => ({ id: `${index}`, title: tuning }));
  const scored: Scored = scoreEvening({
    chairs,
    openings: { fiddle: tuned('GDAE') },
    goal: 'pegs',
    spacedRhythms: [],
    medleys: [],
    sets: [entries.map(({ id }) => id)],
    tunes: tunings.map((tuning, index) => ({
      id: `${index}`,
      tonic: 2,
      rhythm: null,
      accepted: { fiddle: [tuned(tuning)] },
    })),
  });
  return { chairs, sets: [{ entries }], places: scored.places, pegs: scored.score.pegChanges };
}

export function EntryPicture() {
  const [before, after] = [evening(asCalled), evening(better)];
  return (
    <div className={styles.picture}>
      <p>Five tunes as they were called: {count(before.pegs, 'peg')}</p>
      <StringLanes {...before} label="Five tunes as they were called" />
      <p>
        The same five, <b>in a better order: {count(after.pegs, 'peg')}</b>
      </p>
      <StringLanes {...after} label="The same five in a better order" />
    </div>
  );
}
