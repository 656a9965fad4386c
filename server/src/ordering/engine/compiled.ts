import { midiOf } from '@pegwell/shared/music/pitch';
import { standardPitches, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { retune } from '@pegwell/shared/music/retune';
import type { Tuned } from '@pegwell/shared/music/tuning';
import { spacedIn } from '@pegwell/shared/session/running-order';
import type { Evening } from '@pegwell/shared/session/evening';

/** Free: nothing stated yet, and an opening of null. Stands for a tuning and for a stance. */
export const FREE = 0;

/** A kind in small integers. Tunings and stances are counted from 1; 0 is {@link FREE}. */
export interface CompiledKind {
  readonly count: number;
  /** Tunings, FREE included. */
  readonly tunings: number;
  /** By `from * tunings + to`, over all chairs. */
  readonly pegs: Int32Array;
  readonly semitones: Int32Array;
  /** A stance is a tuning with a capo. */
  readonly tuningOf: readonly number[];
  readonly capoOf: readonly number[];
  readonly opening: number;
}

/** One accepted tuning of one kind: its stance, and the chairs for whom it is not the first choice. */
export interface Option {
  readonly stance: number;
  readonly second: number;
}

export interface CompiledEntry {
  readonly id: string;
  /** By kind; null where the kind keeps what it has. */
  readonly options: readonly (readonly Option[] | null)[];
  readonly tonic: number;
  readonly spaced: boolean;
}

export interface Compiled {
  readonly kinds: readonly CompiledKind[];
  /** In the host's order. */
  readonly entries: readonly CompiledEntry[];
}

/**
 * Tunings, capos and tunes as small integers, once per problem; equal by MIDI number and fret, as the score
 * has it.
 */
export function compile(evening: Evening): Compiled {
  const order = evening.sets.flat();
  const tunes = new Map(evening.tunes.map((tune) => [tune.id, tune]));
  const isSpaced = spacedIn(evening.spacedRhythms);
  const chairs = evening.chairs
    .filter(({ count }) => count > 0)
    .sort((a, b) => (a.kind.id < b.kind.id ? -1 : 1));
  const stances = chairs.map(({ kind }) => new Stances(kind));
  const openings = chairs.map(({ kind }, k) => {
    const opening = evening.openings[kind.id];
    if (opening === null) return FREE;
    return stances[k]!.of(opening ?? { pitches: standardPitches(kind), capo: 0 });
  });
  const entries = order.map((id): CompiledEntry => {
    const tune = tunes.get(id);
    if (tune === undefined) throw new RangeError(`No tune has the id ${id}`);
    const options = chairs.map(({ kind, count }, k) => {
      const accepted = tune.accepted[kind.id] ?? 'any';
      return accepted === 'any' || accepted.length === 0 ? null : optionsOf(accepted, stances[k]!, count);
    });
    return { id, options, tonic: tune.tonic, spaced: isSpaced(tune) };
  });
  const kinds = chairs.map(({ count }, k) => stances[k]!.compiled(count, openings[k]!));
  return { kinds, entries };
}

function optionsOf(accepted: readonly Tuned[], stances: Stances, count: number): readonly Option[] {
  const options: Option[] = [];
  accepted.forEach((tuned, position) => {
    const stance = stances.of(tuned);
    if (options.some((option) => option.stance === stance)) return;
    options.push({ stance, second: position > 0 ? count : 0 });
  });
  return options;
}

/** Numbers the tunings and stances of one kind as they are met. */
class Stances {
  private readonly tunings: (readonly string[])[] = [[]];
  private readonly tuningBySound = new Map<string, number>();
  private readonly stanceByKey = new Map<number, number>();
  private readonly tuningOf = [FREE];
  private readonly capoOf = [0];

  constructor(private readonly kind: InstrumentKind) {}

  of({ pitches, capo }: Tuned): number {
    const tuning = this.tuning(pitches);
    const key = tuning * 1000 + capo;
    let stance = this.stanceByKey.get(key);
    if (stance === undefined) {
      stance = this.tuningOf.push(tuning) - 1;
      this.capoOf.push(capo);
      this.stanceByKey.set(key, stance);
    }
    return stance;
  }

  compiled(count: number, opening: number): CompiledKind {
    const tunings = this.tunings.length;
    const pegs = new Int32Array(tunings * tunings);
    const semitones = new Int32Array(tunings * tunings);
    for (let from = 1; from < tunings; from++) {
      for (let to = 1; to < tunings; to++) {
        if (from === to) continue;
        const move = retune(this.kind, this.tunings[from]!, this.tunings[to]!);
        pegs[from * tunings + to] = count * move.pegChanges;
        semitones[from * tunings + to] = count * move.semitones;
      }
    }
    return { count, tunings, pegs, semitones, tuningOf: this.tuningOf, capoOf: this.capoOf, opening };
  }

  private tuning(pitches: readonly string[]): number {
    const sound = pitches.map(midiOf).join(',');
    let tuning = this.tuningBySound.get(sound);
    if (tuning === undefined) {
      tuning = this.tunings.push(pitches) - 1;
      this.tuningBySound.set(sound, tuning);
    }
    return tuning;
  }
}
