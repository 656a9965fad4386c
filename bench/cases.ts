import type { EveningShape } from './evenings';

/** An evening as the Speed table asks for it. Seeds say which. */
export interface Case {
  /** A word for the command line. */
  readonly key: string;
  readonly name: string;
  readonly shape: Omit<EveningShape, 'seed'>;
  /** Levels proved and milliseconds that must be reached on two cores. */
  readonly goal: string;
}

const ROOM = { tunes: 24, sets: 2, kinds: 2 };
export const FIRST = { ...ROOM, groups: 12, pins: 2, alternatives: 0.25, unstated: 0.1 };
export const LARGEST = { tunes: 60, sets: 4, kinds: 6, tunings: 14 };

export const CASES: readonly Case[] = [
  {
    key: 'A',
    name: '24 tunes, fiddle and banjo, 12 groups, 2 pins, alternatives on a quarter, a tenth unstated',
    shape: FIRST,
    goal: 'all 7; 50, p95 200',
  },
  { key: 'As', name: 'the same, fewest stops', shape: { ...FIRST, goal: 'stops' }, goal: '' },
  {
    key: 'Ar',
    name: 'the same, 2 medleys and 2 pairs',
    shape: { ...FIRST, medleys: 2, befores: 2 },
    goal: '',
  },
  {
    key: 'B',
    name: '24 tunes, tunings and keys drawn alike',
    shape: { ...ROOM, uniform: true },
    goal: '2 always, all 7 in 90 %; p95 1500',
  },
  { key: 'Bs', name: 'the same, fewest stops', shape: { ...ROOM, uniform: true, goal: 'stops' }, goal: '' },
  {
    key: 'C',
    name: '40 tunes, 3 sets, 4 kinds, 10 group tunings',
    shape: { tunes: 40, sets: 3, kinds: 4, tunings: 10 },
    goal: '2: p95 150; all 7: p95 1000',
  },
  {
    key: 'D',
    name: 'the same, 11-18 group tunings through alternatives on a fifth',
    shape: { tunes: 40, sets: 3, kinds: 4, tunings: 10, alternatives: 0.2 },
    goal: '2 in 85 %; p95 1000',
  },
  {
    key: 'E',
    name: '60 tunes, 4 sets, 6 kinds, 14 group tunings',
    shape: LARGEST,
    goal: 'all 7 in 90 %; p95 1000',
  },
  {
    key: 'F1',
    name: 'the same, alternatives on a fifth',
    shape: { ...LARGEST, alternatives: 0.2 },
    goal: 'a bound by 2000',
  },
  {
    key: 'F2',
    name: 'the same, half unstated',
    shape: { ...LARGEST, unstated: 0.5 },
    goal: 'a bound by 2000',
  },
  {
    key: 'G',
    name: '200 tunes, one kind, 12 tunings',
    shape: { tunes: 200, sets: 1, kinds: 1, tunings: 12 },
    goal: 'all 7; p95 100',
  },
];
