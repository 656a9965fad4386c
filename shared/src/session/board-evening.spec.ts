import { describe, expect, it } from 'vitest';
import type { ShownEntry } from '../contract/sessions';
import { builtInKind } from '../music/instrument';
import { parseAccepted } from '../music/tuning';
import type { Board } from './board';
import { eveningOfBoard, tuneOfEntry, type EveningSettings } from './board-evening';
import { Insertions } from './insert';
import { scoreEvening } from './score';

function entry(id: string, cells: Record<string, string>, more: Partial<ShownEntry> = {}): ShownEntry {
  return {
    ...{ id, tuneId: `tune-${id}`, settingId: null, open: null, pinned: false, sitOut: [] },
    ...{ title: id, key: 'A', mode: 'major', rhythm: null, minutes: 5, removed: false },
    tunings: Object.entries(cells).map(([kind, cell]) => {
      const parsed = parseAccepted(builtInKind(kind)!, cell);
      if (!parsed.ok) throw new Error(parsed.reason);
      const accepted =
        parsed.value === 'any'
          ? [{ tuning: 'any', pitches: null, capo: 0 }]
          : parsed.value.map(({ pitches, capo }) => ({ tuning: cell, pitches: [...pitches], capo }));
      return { kind, accepted, assumed: false };
    }),
    ...more,
  };
}

const settings = (fiddles: number, more: Partial<EveningSettings> = {}): EveningSettings => ({
  chairs: [{ kind: 'fiddle', count: fiddles }],
  openings: { fiddle: 'GDAE' },
  goal: 'pegs',
  spacedRhythms: ['waltz', 'air'],
  status: 'planned',
  nowEntryId: null,
  inForce: null,
  ...more,
});

function board(...sets: string[][]): Board<ShownEntry> {
  let number = 0;
  return {
    sets: sets.map((tunings, index) => ({
      id: `S${index}`,
      title: '',
      entries: tunings.map((fiddle) => entry(`${++number}`, { fiddle })),
    })),
    medleys: [],
    befores: [],
  };
}

describe('the evening that a board is', () => {
  it('scores worked example 1 of score.md', () => {
    const host = eveningOfBoard(settings(1), board(['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE']));
    expect(scoreEvening(host).score).toMatchObject({ pegChanges: 6, retuneStops: 4, semitones: 12 });
    const best = eveningOfBoard(settings(1), board(['GDAE', 'GDAE', 'ADAE', 'AEAE', 'AEAE']));
    expect(scoreEvening(best).score).toMatchObject({ pegChanges: 2, retuneStops: 2, semitones: 4 });
  });

  it('scores worked example 2 of score.md, two sets and five fiddles', () => {
    const evening = eveningOfBoard(settings(5), board(['GDAE', 'GDAE', 'ADAE'], ['AEAE', 'AEAE']));
    expect(scoreEvening(evening).score).toMatchObject({
      ...{ pegChanges: 10, offClockPegChanges: 5, retuneStops: 1, semitones: 20 },
    });
  });

  it('lets a kind that sits out play as it stands', () => {
    const tune = entry('1', { fiddle: 'AEAE', banjo: 'gDGBD' }, { sitOut: ['fiddle'] });
    expect(tuneOfEntry(tune).accepted).toEqual({
      fiddle: 'any',
      banjo: [{ pitches: ['G4', 'D3', 'G3', 'B3', 'D4'], capo: 0 }],
    });
  });

  it('keeps to an opening that is free', () => {
    const free = settings(1, { openings: { fiddle: null } });
    expect(scoreEvening(eveningOfBoard(free, board(['AEAE', 'GDAE']))).score.pegChanges).toBe(2);
  });

  it('is what is left while it is live, from the tunings in force', () => {
    const live = settings(1, { status: 'live', nowEntryId: '3', inForce: { fiddle: 'AEAE' } });
    const evening = eveningOfBoard(live, board(['GDAE', 'AEAE'], ['GDAE', 'ADAE', 'AEAE']));
    expect(evening.sets).toEqual([['3', '4', '5']]);
    // Now stands in AEAE as a fact, whatever its tune asks for; then D down, D up.
    expect(scoreEvening(evening).places.map(({ pegChanges }) => pegChanges)).toEqual([0, 1, 1]);
  });
});

describe('the price of one more tune', () => {
  const evening = eveningOfBoard(settings(5), board(['GDAE', 'GDAE'], ['AEAE', 'AEAE']));
  const tune = (fiddle: string) => tuneOfEntry(entry('new', { fiddle }));
  const priceOf = (fiddle: string, fixed = 0) => new Insertions(evening, fixed).cheapest(tune(fiddle));

  it('is nothing beside a tune in the same tuning, at the last such place', () => {
    expect(priceOf('AEAE')).toMatchObject({ pegChanges: 0, setIndex: 1, index: 2 });
    // After 2; before 1 is free as well.
    expect(priceOf('GDAE')).toMatchObject({ pegChanges: 0, setIndex: 0, index: 2 });
  });

  it('is nothing between two tunings that it lies between', () => {
    // The break turns G and D; in ADAE the G goes first. At the head of the second set it costs a stop.
    expect(priceOf('ADAE')).toMatchObject({ pegChanges: 0 });
  });

  it('is pegChanges with it less without it', () => {
    // EDAE at either end of the break: the G peg goes down to it and from there up to A, where it turns anyway.
    expect(priceOf('EDAE')).toMatchObject({ pegChanges: 5, setIndex: 1, index: 0 });
    // GDGD after 2: two pegs down, and in the break four in place of two.
    expect(priceOf('GDGD')?.pegChanges).toBe(20);
  });

  it('leaves what is now at its place', () => {
    expect(priceOf('GDAE', 2)).toMatchObject({ pegChanges: 0, setIndex: 0, index: 2 });
  });
});
