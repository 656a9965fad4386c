import { scoreEvening } from '@pegwell/shared/session/score';
import { solve } from '../engine/solve';
import { Solver } from './solver';
import { warmEvening } from './warm-evening';

describe('the solving thread', () => {
  const solver = new Solver();
  afterAll(() => solver.close());

  it('answers what the engine answers', async () => {
    const problem = warmEvening(1);
    const answer = await solver.solve(problem);
    expect(answer).toEqual(solve(problem));
  });

  it('leaves the event loop free, and answers askers in turn', async () => {
    let ticks = 0;
    const timer = setInterval(() => ticks++, 5);
    const answers = await Promise.all(
      [0, 1, 2, 3, 4, 5, 6, 7].map((round) => solver.solve(warmEvening(round))),
    );
    clearInterval(timer);
    expect(answers.map(({ outcome }) => outcome)).toEqual(new Array(8).fill('solution'));
    expect(ticks).toBeGreaterThan(2);
  });

  it('lets askers take turns, however many one of them sent', async () => {
    const answered: string[] = [];
    const ask = async (asker: string, round: number): Promise<void> => {
      await solver.solve(warmEvening(round), { asker });
      answered.push(asker);
    };
    await Promise.all([
      ...[0, 1, 2, 3, 4, 5].map((round) => ask('many', round)),
      ask('one', 6),
      ask('two', 7),
    ]);
    // The first of many was being solved when the others came; the second was in the line before them.
    expect(answered.indexOf('one')).toBeLessThanOrEqual(2);
    expect(answered.indexOf('two')).toBeLessThanOrEqual(3);
    expect(answered.filter((asker) => asker === 'many')).toHaveLength(6);
  });

  it('gives the best so far when time is up, never worse than the host order', async () => {
    const problem = warmEvening(2);
    const answer = await solver.solve({ ...problem, pins: {} }, { limitMs: 0 });
    expect(answer.outcome).toBe('solution');
    if (answer.outcome !== 'solution') return;
    expect(answer.stopped).toBe('time');
    expect(answer.optimal).toBe(false);
    expect(answer.score.pegChanges).toBeLessThanOrEqual(scoreEvening(problem).score.pegChanges);
  });

  it('calls a search off when its asker goes away, and keeps its thread', async () => {
    const gone = new AbortController();
    const asked = [solver.solve(warmEvening(0), { signal: gone.signal }), solver.solve(warmEvening(1))];
    gone.abort();
    const [first, second] = await Promise.allSettled(asked);
    expect(first!.status).toBe('rejected');
    expect(second!.status).toBe('fulfilled');
    await expect(solver.solve(warmEvening(0), { signal: AbortSignal.abort() })).rejects.toThrow();
  });

  it('refuses one mistaken problem without losing the next', async () => {
    const problem = warmEvening(0);
    const mistaken = { ...problem, sets: [['no such tune']] };
    await expect(solver.solve(mistaken)).rejects.toThrow('No tune has the id');
    expect((await solver.solve(problem)).outcome).toBe('solution');
  });
});
