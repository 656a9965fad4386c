import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import type { OrderingProblem, Solution } from '../../src/ordering/engine/ordering-problem';
import { solve } from '../../src/ordering/engine/solve';

function solved(problem: OrderingProblem): Solution {
  const answer = solve(problem);
  if (answer.outcome !== 'solution') throw new Error(answer.outcome);
  return answer;
}

const fiddle = builtInKind('fiddle')!;
function fiddleEvening(
  cells: readonly string[],
  opening: string | null,
  sizes: readonly number[],
  count = 1,
): OrderingProblem {
  const tuned = (text: string) => {
    const parsed = parseTuning(fiddle, text);
    if (!parsed.ok) throw new Error(parsed.reason);
    return parsed.value;
  };
  const ids = cells.map((_, index) => `${index + 1}`);
  let from = 0;
  return {
    chairs: [{ kind: fiddle, count }],
    openings: { fiddle: opening === null ? null : tuned(opening) },
    goal: 'pegs',
    spacedRhythms: [],
    tunes: ids.map((id, index) => ({
      id,
      tonic: 9,
      rhythm: null,
      accepted: { fiddle: [tuned(cells[index]!)] },
    })),
    sets: sizes.map((size) => ids.slice(from, (from += size))),
    medleys: [],
    pins: {},
    befores: [],
  };
}

describe('what is known from elsewhere', () => {
  // Best order of one tune each over all 8! orders (facts.md): 8 strings with a free start and from GDAE.
  const EIGHT = ['GDAE', 'ADAE', 'AEAE', 'GDGD', 'DDAD', 'AEAC#', 'GDAD', 'AEAD'];
  it.each([null, 'GDAE'])('orders the eight tunings of facts.md in 8 strings, from %s', (opening) => {
    const answer = solved(fiddleEvening(EIGHT, opening, [8]));
    expect(answer.score.pegChanges).toBe(8);
    expect(answer).toMatchObject({ optimal: true, provenLevels: 7, lowerBound: 8 });
  });

  it('finds the best orders of the worked examples of score.md', () => {
    const cells = ['GDAE', 'AEAE', 'GDAE', 'ADAE', 'AEAE'];
    const one = solved(fiddleEvening(cells, 'GDAE', [5]));
    expect(one.score).toMatchObject({ pegChanges: 2, retuneStops: 2, semitones: 4 });
    const two = solved(fiddleEvening(cells, 'GDAE', [3, 2], 5));
    expect(two.score).toMatchObject({ pegChanges: 10, offClockPegChanges: 5, retuneStops: 1, semitones: 20 });
    expect(two.optimal).toBe(true);
  });
});
