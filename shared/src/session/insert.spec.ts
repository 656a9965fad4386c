import { describe, expect, it } from 'vitest';
import { builtInKind } from '../music/instrument';
import { parseAccepted } from '../music/tuning';
import type { Evening, EveningTune, Score } from './evening';
import { randomEvening } from './evening-fixtures';
import { Insertions, type Price } from './insert';
import { levelsOf } from './levels';
import { compareScores, scoreEvening } from './score';

/** The evening with the tune in it, as anybody would write it down. */
function withTune(evening: Evening, tune: EveningTune, setIndex: number, index: number): Evening {
  const sets = evening.sets.length > 0 ? evening.sets : [[]];
  return {
    ...evening,
    tunes: [...evening.tunes, tune],
    sets: sets.map((set, at) =>
      at === setIndex ? [...set.slice(0, index), tune.id, ...set.slice(index)] : set,
    ),
  };
}

/** Every place priced by scoring the whole evening anew: what score.md says a tune costs. */
function plainly(evening: Evening, tune: EveningTune, fixed = 0): { price: Price; score: Score }[] {
  const without = scoreEvening(evening).score;
  const sets = evening.sets.length > 0 ? evening.sets : [[]];
  return sets.flatMap((set, setIndex) =>
    Array.from({ length: set.length + 1 }, (_, index) => index)
      .filter((index) => setIndex > 0 || index >= fixed)
      .map((index) => {
        const { score } = scoreEvening(withTune(evening, tune, setIndex, index));
        const levels = Object.fromEntries(
          levelsOf('pegs').map((level) => [level, score[level] - without[level]]),
        ) as NonNullable<Price['levels']>;
        return { price: { setIndex, index, pegChanges: levels.pegChanges, levels }, score };
      }),
  );
}

describe('one more tune at every place', () => {
  it('costs what scoring every order anew says, on all levels, in 500 random evenings', () => {
    let placesOfAll = 0;
    for (let seed = 1; seed <= 500; seed++) {
      const evening = randomEvening(seed, 9);
      const fixed = seed % 4 === 0 && evening.sets[0]!.length > 0 ? 1 : 0;
      const insertions = new Insertions(evening, fixed);
      for (const drawn of randomEvening(seed + 1_000_000, 2).tunes) {
        const tune = { ...drawn, id: 'new' };
        const expected = plainly(evening, tune, fixed);
        expect({ seed, prices: insertions.everywhere(tune) }).toEqual({
          seed,
          prices: expected.map(({ price }) => price),
        });
        const best = expected.reduce((least, each) =>
          compareScores(each.score, least.score, evening.goal) <= 0 ? each : least,
        );
        expect({ seed, price: insertions.cheapest(tune) }).toEqual({ seed, price: best.price });
        placesOfAll += expected.length;
      }
    }
    expect(placesOfAll).toBeGreaterThan(4_000);
  }, 60_000);
});

describe('one more tune as the next one', () => {
  const tune = (id: string, fiddle: string): EveningTune => {
    const parsed = parseAccepted(builtInKind('fiddle')!, fiddle);
    if (!parsed.ok) throw new Error(parsed.reason);
    return { id, tonic: 9, rhythm: null, accepted: { fiddle: parsed.value } };
  };
  const evening = (...sets: EveningTune[][]): Evening => ({
    chairs: [{ kind: builtInKind('fiddle')!, count: 5 }],
    openings: {},
    goal: 'pegs',
    spacedRhythms: [],
    tunes: sets.flat(),
    sets: sets.map((set) => set.map(({ id }) => id)),
    medleys: [],
  });
  const planned = evening([tune('1', 'GDAE'), tune('2', 'AEAE')], [tune('3', 'GDAE')], []);

  it('stands behind the last tune of a planned evening', () => {
    // GDAE to AEAE: two pegs on each of five fiddles.
    expect(new Insertions(planned).next(tune('new', 'AEAE'))).toMatchObject({
      ...{ setIndex: 1, index: 1, pegChanges: 10 },
      levels: { retuneStops: 1, semitones: 20 },
    });
  });

  it('stands behind the tune that is now while the evening runs', () => {
    // Between GDAE and AEAE: ADAE lies on the way.
    expect(new Insertions(planned, 1).next(tune('new', 'ADAE'))).toMatchObject({
      ...{ setIndex: 0, index: 1, pegChanges: 0 },
      levels: { retuneStops: 1 },
    });
  });

  it('is what is turned on arriving where there is no set yet', () => {
    const price = { setIndex: 0, index: 0, pegChanges: 10 };
    expect(new Insertions(evening()).next(tune('new', 'AEAE'))).toMatchObject(price);
    expect(new Insertions(evening()).cheapest(tune('new', 'AEAE'))).toMatchObject(price);
    expect(new Insertions(evening([])).cheapest(tune('new', 'AEAE'))).toMatchObject(price);
  });
});

describe('one more tune where everybody accepts everything', () => {
  /** 2^6 ways to stand after each of 40 tunes, most of them in the next tune's list too. */
  function wide(goal: Evening['goal']): Evening {
    const kinds = ['banjo', 'bouzouki', 'fiddle', 'guitar', 'mandolin', 'ukulele'].map((id) =>
      builtInKind(id)!,
    );
    const tunes = Array.from({ length: 40 }, (_, at): EveningTune => ({
      id: `t${at}`,
      tonic: 2,
      rhythm: null,
      accepted: Object.fromEntries(
        kinds.map(({ id, courses }, k) => {
          const standard = courses.map(({ standard: pitch }) => pitch);
          const lowered = standard.with((at * 7 + k) % standard.length, 'F3');
          return [
            id,
            [
              { pitches: lowered, capo: 0 },
              { pitches: standard, capo: (at + k) % 3 },
            ],
          ];
        }),
      ),
    }));
    const ids = tunes.map(({ id }) => id);
    return {
      ...{ chairs: kinds.map((kind) => ({ kind, count: 2 })), openings: {}, goal },
      ...{ spacedRhythms: [], tunes, sets: [ids.slice(0, 20), ids.slice(20)], medleys: [] },
    };
  }

  it('still costs the pegs that scoring anew says, and claims no other level', () => {
    const evening = wide('pegs');
    const tune = { ...evening.tunes[3]!, id: 'new' };
    const prices = new Insertions(evening).everywhere(tune);
    for (const place of [0, 7, 20, 41]) {
      const expected = plainly(evening, tune)[place]!.price;
      expect(prices[place]).toEqual({ ...expected, levels: null });
    }
  });

  it('is priced by pegs whatever the goal, and at once', () => {
    const [pegs, stops] = [wide('pegs'), wide('stops')];
    const tune = { ...pegs.tunes[3]!, id: 'new' };
    const begun = performance.now();
    expect(new Insertions(stops).everywhere(tune)).toEqual(new Insertions(pegs).everywhere(tune));
    expect(performance.now() - begun).toBeLessThan(2_000);
  });
});
