/** What stands on a set sheet, all in words: read from a stored evening, drawn by `pdf/`, sent between threads. */
export interface Sheet {
  readonly title: string;
  /** `Thursday 11 March 2027, 19:30`, in the evening's own zone. */
  readonly when: string;
  readonly place: string | null;
  readonly notes: string | null;
  /** The kinds that retune, in the order of their columns. */
  readonly room: readonly SheetKind[];
  /** `440`, or `441.5` */
  readonly referenceA: string;
  /** `24 tunes, about 2 h 40` */
  readonly summary: string;
  readonly follow: { readonly url: string; readonly code: string };
  /** What to arrive in, kind by kind; empty once the evening is under way. */
  readonly arrivals: readonly SheetArrival[];
  readonly sets: readonly SheetSet[];
  /** Whether any peg is turned all evening. */
  readonly turns: boolean;
  /** What the marks behind tunings mean, as far as there are any. */
  readonly legend: readonly string[];
}

export interface SheetKind {
  /** `Fiddle` */
  readonly name: string;
  /** `5 fiddles` */
  readonly players: string;
}

export interface SheetArrival {
  readonly kind: string;
  /** Null: tune to the first tune, and none of them says to what. */
  readonly tuning: SheetTuning | null;
  /** The host named no opening: tune to the first tune. */
  readonly free: boolean;
}

export interface SheetSet {
  readonly title: string;
  readonly entries: readonly SheetEntry[];
}

export interface SheetEntry {
  /** Counted from 1 through the whole evening. */
  readonly number: number;
  /** Null for an open place. */
  readonly title: string | null;
  /** `A modal · reel`; an open place has its minutes: `A · 40 min` */
  readonly key: string;
  /** One per kind in the room. */
  readonly tunings: readonly SheetTuning[];
  readonly notes: string | null;
  /** The next one follows without stopping. */
  readonly straightOn: boolean;
  /** What is done before it; null where nothing moves. */
  readonly before: SheetPlace | null;
}

/** `assumed`: by the circle's usual tunings. `as it stands`: the tune says `any`. `past`: called before now. */
export type Standing = 'stated' | 'assumed' | 'as it stands' | 'sits out' | 'past';

export interface SheetTuning {
  /** As shown, without the capo; empty where there is nothing to show. */
  readonly letters: string;
  /** Fret, 0 for none. */
  readonly capo: number;
  readonly standing: Standing;
}

export interface SheetPlace {
  readonly when: 'before the first tune' | 'in the break' | 'between';
  readonly moves: readonly SheetMove[];
}

export interface SheetMove {
  /** `Fiddles`, or `Fiddle` where there is one. */
  readonly who: string;
  readonly to: SheetTuning;
  /** Before any peg: `capo off`, or empty. */
  readonly first: string;
  /** `A peg down a whole step, to G; E peg down a whole step, to D`; where no peg turns, what the capo does. */
  readonly words: string;
  /** After the pegs: `check all four`, and the capo on; empty where no peg turns. */
  readonly last: string;
  readonly cautions: readonly string[];
  /** One per course, in string order; null where no peg turns. */
  readonly strip: readonly SheetPeg[] | null;
}

export interface SheetPeg {
  /** Its standing name: `G`. */
  readonly name: string;
  /** 2 for a doubled course. */
  readonly pegs: number;
  readonly turn: { readonly up: boolean; readonly target: string } | null;
}
