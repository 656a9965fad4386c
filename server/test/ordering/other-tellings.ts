import type { Tuned } from '@pegwell/shared/music/tuning';
import type { OrderingProblem } from '../../src/ordering/engine/ordering-problem';
import { midi } from './reading';

/** The same evening told in another way, in which something about the answer must not change. */

const OTHERWISE: Record<string, (octave: number) => string> = {
  'C#': (octave) => `Db${octave}`,
  E: (octave) => `Fb${octave}`,
  B: (octave) => `Cb${octave + 1}`,
  D: (octave) => `C##${octave}`,
  G: (octave) => `Abb${octave}`,
};

/** Pitches spelled otherwise where they can be: the same tunings, of other letters. */
export function respelled(problem: OrderingProblem): OrderingProblem {
  const spell = (pitch: string): string => OTHERWISE[pitch.slice(0, -1)]?.(Number(pitch.at(-1))) ?? pitch;
  let nth = 0;
  return withTunings(problem, (_, pitches) => (nth++ % 2 === 0 ? pitches.map(spell) : pitches));
}

/**
 * Tunings renamed: on each string the pitches change names among themselves, so that the same strings turn
 * between any two tunings, by other numbers of semitones.
 */
export function retold(problem: OrderingProblem): OrderingProblem {
  const known = new Map<string, string[]>();
  withTunings(problem, (kind, pitches) => {
    pitches.forEach((pitch, course) => {
      const key = `${kind} ${course}`;
      const names = known.get(key) ?? [];
      if (!names.some((name) => midi(name) === midi(pitch))) known.set(key, [...names, pitch]);
    });
    return pitches;
  });
  return withTunings(problem, (kind, pitches) =>
    pitches.map((pitch, course) => {
      const names = known.get(`${kind} ${course}`)!;
      return names[(names.findIndex((name) => midi(name) === midi(pitch)) + 1) % names.length]!;
    }),
  );
}

export function backToFront(problem: OrderingProblem): OrderingProblem {
  return {
    ...problem,
    sets: problem.sets.map((set) => [...set].reverse()).reverse(),
    medleys: problem.medleys.map((medley) => [...medley].reverse()),
    befores: problem.befores.map(([first, second]) => [second, first]),
  };
}

function withTunings(
  problem: OrderingProblem,
  told: (kind: string, pitches: readonly string[]) => readonly string[],
): OrderingProblem {
  const tuned = (kind: string, it: Tuned): Tuned => ({ ...it, pitches: told(kind, it.pitches) });
  return {
    ...problem,
    openings: Object.fromEntries(
      problem.chairs.map(({ kind }) => {
        const standard = { pitches: kind.courses.map(({ standard }) => standard), capo: 0 };
        const opening = problem.openings[kind.id];
        return [kind.id, opening === null ? null : tuned(kind.id, opening ?? standard)];
      }),
    ),
    tunes: problem.tunes.map((tune) => ({
      ...tune,
      accepted: Object.fromEntries(
        Object.entries(tune.accepted).map(([kind, list]) => [
          kind,
          list === 'any' ? list : list.map((it) => tuned(kind, it)),
        ]),
      ),
    })),
  };
}
