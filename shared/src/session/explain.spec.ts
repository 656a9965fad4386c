import { describe, expect, it } from 'vitest';
import { builtInKind } from '../music/instrument';
import { parseAccepted, parseTuning, type Tuned } from '../music/tuning';
import type { Evening, EveningTune, Score } from './evening';
import { randomEvening } from './evening-fixtures';
import { explain, type ExplainedPlace } from './explain';
import { levelsOf } from './levels';
import { scoreEvening } from './score';
import { difference } from './score-words';

const explained = (evening: Evening): readonly ExplainedPlace[] =>
  explain(evening, scoreEvening(evening), (id) => ({ title: `Tune ${id}`, key: id === '2' ? 'D' : 'A' }));
const wordsOf = (place: ExplainedPlace | undefined) => place?.reasons.map(({ words }) => words);

function read<T>(parsed: { ok: true; value: T } | { ok: false; reason: string }): T {
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
}
const tune = (id: string, fiddle: string, banjo: string, more: Partial<EveningTune> = {}): EveningTune => ({
  ...{ id, tonic: id === '2' ? 2 : 9, rhythm: null },
  accepted: Object.fromEntries(
    Object.entries({ fiddle, banjo }).map(([kind, cell]) => [
      kind,
      read<readonly Tuned[] | 'any'>(parseAccepted(builtInKind(kind)!, cell)),
    ]),
  ),
  ...more,
});
const room = (
  tunes: readonly EveningTune[],
  sets: readonly (readonly string[])[],
  more: Partial<Evening> = {},
) => ({
  chairs: [
    { kind: builtInKind('fiddle')!, count: 5 },
    { kind: builtInKind('banjo')!, count: 1 },
  ],
  openings: { fiddle: read(parseTuning(builtInKind('fiddle')!, 'GDAE')) },
  ...{ goal: 'pegs' as const, spacedRhythms: ['waltz', 'air'], tunes, sets, medleys: [], ...more },
});

describe('an order explained', () => {
  it('adds up to the score, level by level, in 300 random evenings', () => {
    for (let seed = 1; seed <= 300; seed++) {
      const evening = randomEvening(seed, 8);
      const { score } = scoreEvening(evening);
      const reasons = explained(evening).flatMap((place) => place.reasons);
      for (const level of levelsOf('pegs')) {
        const sum = reasons.filter((each) => each.level === level).reduce((all, each) => all + each.count, 0);
        expect({ seed, level, sum }).toEqual({ seed, level, sum: score[level] });
      }
      for (const { words } of reasons) expect(words).toMatch(/^[\dA-Z].*\.$/);
    }
  });

  it('says who turns what, and why it is a stop or none', () => {
    const places = explained(
      room(
        [tune('1', 'ADAE', 'any'), tune('2', 'AEAE', 'gDGBD capo 2'), tune('3', 'GDAE', 'gDGCD')],
        [['1', '2'], ['3']],
      ),
    );
    expect(places.map(({ before, offClock, pegChanges }) => [before, offClock, pegChanges])).toEqual([
      ['1', true, 5],
      ['2', false, 5],
      ['3', true, 11],
    ]);
    expect(wordsOf(places[0])).toEqual([
      '5 fiddles: G peg up a whole step, to A.',
      'No stop: it is done before the first tune, and nobody waits.',
      '10 half steps turned in all.',
    ]);
    // One peg each: a minute and a half (minutes.ts).
    expect(wordsOf(places[1])).toEqual([
      '5 fiddles: D peg up a whole step, to E.',
      'A stop inside a set: the room waits about 1½ min.',
      '1 banjo: capo on at fret 2.',
      'The key changes from A to D.',
      '10 half steps turned in all.',
    ]);
    expect(wordsOf(places[2])?.slice(0, 3)).toEqual([
      '5 fiddles: G peg down a whole step, to G; D peg down a whole step, to D.',
      '1 banjo: B peg up a half step, to C.',
      'No stop: it is done in the break, and nobody waits.',
    ]);
  });

  it('names neighbours of a spaced rhythm, second choices, and what changes inside a medley', () => {
    const waltz = { rhythm: 'Waltz' };
    const tunes = [
      tune('1', 'GDAE', 'any', waltz),
      tune('3', 'AEAE or GDAE', 'any', waltz),
      tune('4', 'GDAE', 'any', { rhythm: 'air' }),
      tune('5', 'ADAE', 'gCGCD', {}),
    ];
    const places = explained(room(tunes, [['1', '3', '4', '5']], { medleys: [['4', '5']] }));
    expect(wordsOf(places[1])).toEqual([
      'Two of a kind in a row: Tune 1 (waltz) and Tune 3 (waltz).',
      '5 fiddles in GDAE, their second choice; the first is AEAE.',
    ]);
    expect(wordsOf(places[2])?.[0]).toBe('Two of a kind in a row: Tune 3 (waltz) and Tune 4 (air).');
    expect(wordsOf(places[3])).toContain(
      'Inside a medley: 5 fiddles and 1 banjo must change between two of its tunes.',
    );
  });

  it('has nothing to say where nothing happens', () => {
    const places = explained(room([tune('1', 'GDAE', 'any'), tune('3', 'GDAE', 'any')], [['1', '3']]));
    expect(places.map(({ reasons }) => reasons)).toEqual([[], []]);
  });
});

describe('the difference between two scores', () => {
  const score = (more: Partial<Score>): Score => ({
    ...{ pegChanges: 40, retuneStops: 5, ruleBreaks: 0, secondChoices: 2 },
    ...{ capoMoves: 1, keyChanges: 9, semitones: 90, offClockPegChanges: 10 },
    ...more,
  });
  it.each([
    [{ pegChanges: 34, retuneStops: 4 }, 'pegs', '6 pegs and 1 stop fewer', 2],
    [{ pegChanges: 34, retuneStops: 4 }, 'stops', '1 stop and 6 pegs fewer', 2],
    [{ pegChanges: 39, retuneStops: 7 }, 'pegs', '1 peg fewer, 2 stops more', 2],
    [{ pegChanges: 30, keyChanges: 2 }, 'pegs', '10 pegs fewer', 1],
    [{ retuneStops: 4 }, 'pegs', '1 stop fewer', 2],
    [{ keyChanges: 8, semitones: 95 }, 'pegs', '1 key change fewer', 6],
    [{ semitones: 95 }, 'pegs', '5 half steps more', 7],
    [{ offClockPegChanges: 20 }, 'pegs', '', 7],
  ] as const)('%o, goal %s, is "%s"', (more, goal, words, levels) => {
    expect(difference(score(more), score({}), goal)).toEqual({ words, levels });
  });
});
