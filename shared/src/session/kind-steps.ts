import type { InstrumentKind } from '../music/instrument';
import { midiOf } from '../music/pitch';
import { retune, type Retune } from '../music/retune';
import type { Tuned } from '../music/tuning';
import type { Chair } from './evening';

/** One way a kind may stand after a tune. `tuned` is null while the kind is free. */
export interface Stand {
  readonly tuned: Tuned | null;
  /** Position in the tune's accepted list, the smallest where the list repeats itself; 0 for `any`. */
  readonly position: number;
  /** Two stands are the same where these are: tunings by MIDI number, and the capo. */
  readonly same: string;
}

export function standOf(tuned: Tuned | null, position: number): Stand {
  return { tuned, position, same: tuned === null ? '' : `${soundOf(tuned.pitches)} ${tuned.capo}` };
}

/** The ways to stand for a tune that accepts these. */
export function standsFor(accepted: readonly Tuned[]): readonly Stand[] {
  const seen = new Set<string>();
  return accepted.map(standOf).filter(({ same }) => !seen.has(same) && seen.add(same));
}

/** What going from one stand to another takes, wherever it happens. Figures are over all chairs of the kind. */
export interface Change {
  readonly pegs: number;
  readonly semitones: number;
  readonly turns: boolean;
  /** Changes tuning or capo: what breaks a medley. Being first stated changes nothing. */
  readonly changes: boolean;
  /** Chairs whose capo moves. */
  readonly capo: number;
  /** The same retune for one chair. */
  readonly perChair: { readonly deltas: readonly number[]; readonly pegChanges: number };
}

/** Reckons the changes of one kind; retunes that come again are remembered. */
export function changesOf({ kind, count }: Chair): (from: Stand, to: Stand) => Change {
  const retuneOf = rememberedRetunes(kind);
  const still: Change = {
    ...{ pegs: 0, semitones: 0, turns: false, changes: false, capo: 0 },
    perChair: { deltas: kind.courses.map(() => 0), pegChanges: 0 },
  };
  return (from, to) => {
    if (from.tuned === null || to.tuned === null || from.same === to.same) return still;
    const { deltas, pegChanges, semitones } = retuneOf(from.tuned, to.tuned);
    return {
      pegs: count * pegChanges,
      semitones: count * semitones,
      turns: pegChanges > 0,
      changes: true,
      capo: from.tuned.capo === to.tuned.capo ? 0 : count,
      perChair: { deltas, pegChanges },
    };
  };
}

/** Spelling is read once per list of pitches: a board is scored again with every card that moves. */
const sounds = new WeakMap<readonly string[], string>();

function soundOf(pitches: readonly string[]): string {
  const known = sounds.get(pitches);
  if (known !== undefined) return known;
  const sound = pitches.map(midiOf).join(',');
  sounds.set(pitches, sound);
  return sound;
}

function rememberedRetunes(kind: InstrumentKind): (from: Tuned, to: Tuned) => Retune {
  const known = new Map<string, Retune>();
  return (from, to) => {
    const key = `${from.pitches.join(' ')}>${to.pitches.join(' ')}`;
    const remembered = known.get(key);
    if (remembered !== undefined) return remembered;
    const found = retune(kind, from.pitches, to.pitches);
    known.set(key, found);
    return found;
  };
}
