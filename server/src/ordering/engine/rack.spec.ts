import { builtInKind } from '@pegwell/shared/music/instrument';
import { planRack, type RackPlan, type RackProblem, type RackTune } from './rack';

const fiddle = builtInKind('fiddle')!;
const GDAE = 'G3 D4 A4 E5';
const ADAE = 'A3 D4 A4 E5';
const AEAE = 'A3 E4 A4 E5';
const GDGD = 'G3 D4 G4 D5';
const DDAD = 'D3 D4 A4 D5';

const plan = (problem: RackProblem): RackPlan => {
  const planned = planRack(problem);
  if (!planned.ok) throw new Error(planned.reason);
  return planned.value;
};

/** `| AEAE GDAE - | ADAE`: `|` before a set, `-` for a tune as it stands. */
function tunesOf(sets: readonly (readonly (string | null)[])[]): RackTune[] {
  return sets.flatMap((set, number) =>
    set.map((pitches, index) => ({
      id: `${number}.${index}`,
      offClock: index === 0,
      announced: pitches === null ? null : { pitches: pitches.split(' '), capo: 0 },
    })),
  );
}

const pitches = (text: string) => text.split(' ');
const bare = (text: string) => ({ pitches: pitches(text), capo: 0 });

describe('a rack plan', () => {
  it('is what one works out by hand: a second fiddle saves eight pegs of ten, and all five stops', () => {
    const tunes = tunesOf([[GDAE, AEAE, GDAE, AEAE, GDAE, AEAE]]);
    const {
      bring,
      cost,
      alone,
      turns,
      tunes: played,
    } = plan({ kind: fiddle, starts: [pitches(GDAE), pitches(GDAE)], tunes });
    expect(bring).toEqual([pitches(GDAE), pitches(GDAE)]);
    expect(played.map(({ instrument }) => instrument)).toEqual([0, 1, 0, 1, 0, 1]);
    expect(turns).toEqual([
      {
        ...{ before: '0.0', needed: '0.1', offClock: true, instrument: 1, from: bare(GDAE), to: bare(AEAE) },
        ...{ deltas: [2, 2, 0, 0], pegChanges: 2, semitones: 4 },
      },
    ]);
    expect(cost).toEqual({ pegChanges: 2, stops: 0, semitones: 4 });
    expect(alone).toEqual({ pegChanges: 10, stops: 5, semitones: 20 });
  });

  it('tunes free instruments at home, and says which is not needed', () => {
    const tunes = tunesOf([[AEAE, GDGD, AEAE]]);
    const { bring, cost } = plan({ kind: fiddle, starts: [null, null, null], tunes });
    expect(bring).toEqual([pitches(AEAE), pitches(GDGD), null]);
    expect(cost).toEqual({ pegChanges: 0, stops: 0, semitones: 0 });
  });

  it('retunes a resting fiddle in the break, tunes before it is needed', () => {
    const tunes = tunesOf([[GDAE], [ADAE, ADAE, DDAD]]);
    const { cost, turns } = plan({ kind: fiddle, starts: [pitches(ADAE), pitches(GDAE)], tunes });
    expect(turns.map(({ before, needed, instrument, to }) => [before, needed, instrument, to])).toEqual([
      ['1.0', '1.2', 1, bare(DDAD)],
    ]);
    expect(cost).toEqual({ pegChanges: 2, stops: 0, semitones: 7 });
  });

  it('retunes two at one stop, where the second has rested since before it', () => {
    const tunes = tunesOf([[GDAE, AEAE, GDGD, DDAD]]);
    const { cost, turns } = plan({ kind: fiddle, starts: [pitches(GDAE), pitches(AEAE)], tunes });
    expect(turns.map(({ before }) => before)).toEqual(['0.2', '0.3']);
    expect(cost.stops).toBe(2);
    const longer = plan({
      kind: fiddle,
      starts: [pitches(GDAE), pitches(AEAE), pitches(ADAE)],
      tunes: tunesOf([[ADAE, GDAE, AEAE, GDGD, DDAD]]),
    });
    expect(longer.turns.map(({ before }) => before)).toEqual(['0.3', '0.3']);
    expect(longer.cost.stops).toBe(1);
  });

  it('stays on what is held where a tune is played as it stands, and moves capos for nothing', () => {
    const banjo = builtInKind('banjo')!;
    const openG = pitches('G4 D3 G3 B3 D4');
    const sawmill = pitches('G4 D3 G3 C4 D4');
    const tune = (id: string, announced: RackTune['announced']) => ({ id, offClock: id === 'a', announced });
    const { tunes, cost } = plan({
      kind: banjo,
      starts: [openG, sawmill],
      tunes: [
        tune('a', { pitches: openG, capo: 0 }),
        tune('b', { pitches: sawmill, capo: 2 }),
        tune('c', null),
        tune('d', { pitches: openG, capo: 2 }),
      ],
    });
    expect(tunes.map(({ instrument, tuned }) => [instrument, tuned?.capo])).toEqual([
      [0, 0],
      [1, 2],
      [1, 2],
      [0, 2],
    ]);
    expect(cost).toEqual({ pegChanges: 0, stops: 0, semitones: 0 });
  });

  it('answers an evening without tunes, and one where everything is played as it stands', () => {
    const none = { pegChanges: 0, stops: 0, semitones: 0 };
    const empty = plan({ kind: fiddle, starts: [pitches(GDAE), null], tunes: [] });
    expect(empty).toEqual({ bring: [pitches(GDAE), null], tunes: [], turns: [], cost: none, alone: none });
    const any = plan({ kind: fiddle, starts: [null], tunes: tunesOf([[null, null]]) });
    expect(any.tunes.map(({ instrument, tuned }) => [instrument, tuned])).toEqual([
      [0, null],
      [0, null],
    ]);
  });

  it('takes 1 to 4 instruments', () => {
    const starts = (count: number) => Array.from({ length: count }, () => pitches(GDAE));
    expect(() => planRack({ kind: fiddle, starts: [], tunes: [] })).toThrow(RangeError);
    expect(() => planRack({ kind: fiddle, starts: starts(5), tunes: [] })).toThrow(RangeError);
    expect(planRack({ kind: fiddle, starts: starts(4), tunes: [] }).ok).toBe(true);
  });

  it('says that 15 tunings are too many, and plans 14 beside four others to arrive in', () => {
    const row = (count: number) =>
      tunesOf([Array.from({ length: count }, (_, index) => `${NAMES[index]}3 D4 A4 E5`)]);
    const starts = ['G3 D4 A4 D5', 'G3 D4 G4 E5', 'G3 C4 A4 E5', 'G3 E4 A4 E5'].map(pitches);
    expect(planRack({ kind: fiddle, starts, tunes: row(15) })).toEqual({
      ok: false,
      reason: 'This evening asks a fiddle for 15 tunings. A plan is worked out for up to 14.',
    });
    expect(plan({ kind: fiddle, starts, tunes: row(14) }).cost.pegChanges).toBeGreaterThanOrEqual(14);
  });

  it('takes tunings that sound alike for one', () => {
    const calico = [pitches('A3 E4 A4 C#5'), pitches('A3 E4 A4 Db5')];
    const tunes = calico.map((each, index): RackTune => ({
      ...{ id: `${index}`, offClock: index === 0 },
      announced: { pitches: each, capo: 0 },
    }));
    expect(plan({ kind: fiddle, starts: [null], tunes }).cost.pegChanges).toBe(0);
  });
});

/** Fifteen pitches for one string; the octave is the test's. */
const NAMES = ['C', 'C#', 'D', 'D#', 'E', 'F', 'F#', 'G', 'G#', 'A', 'A#', 'B', 'B#', 'B##', 'Cb'];
