import type { EveningTune } from '../shared/src/session/evening';
import { Insertions } from '../shared/src/session/insert';
import { benchEvening, type EveningShape } from './evenings';
import { at, short, timed } from './figures';

/**
 * What one more tune costs, timed: `node --conditions pegwell-source --import tsx bench/insert.ts [runs]`. A
 * run is a seeded evening weighed anew and one tune of another at every place of it; every tenth run, a library
 * of 2,000 tunes as the next one and at its cheapest place. Times are of the processor, warm.
 */
const ROOM = { tunes: 60, sets: 4, kinds: 6, tunings: 14 };
const CASES: readonly { readonly name: string; readonly shape: Omit<EveningShape, 'seed'> }[] = [
  { name: '60 tunes, 6 kinds, all stated', shape: ROOM },
  { name: 'the same, alternatives on a fifth', shape: { ...ROOM, alternatives: 0.2 } },
  { name: 'the same, half unstated', shape: { ...ROOM, unstated: 0.5 } },
  { name: 'the same, both, stops', shape: { ...ROOM, alternatives: 0.2, unstated: 0.5, goal: 'stops' } },
  {
    name: '24 tunes, 2 kinds, a quarter alternatives',
    shape: { tunes: 24, sets: 2, kinds: 2, groups: 12, alternatives: 0.25 },
  },
];
const LIBRARY = 2_000;
const runs = Number(process.argv[2] ?? 100);

console.log('ms, median and p95'.padEnd(44), 'one tune, every place   library: next   cheapest   pegs only');
for (const { name, shape } of CASES) {
  const [every, next, cheapest]: [number[], number[], number[]] = [[], [], []];
  let pegsOnly = 0;
  for (let run = -100; run < runs; run++) {
    const evening = benchEvening({ ...shape, seed: 100 + run });
    const tune = { ...benchEvening({ ...shape, seed: 5_000 + run }).tunes[0]!, id: 'one more' };
    const { ms } = timed(() => new Insertions(evening).everywhere(tune));
    if (run >= 0) every.push(ms);
  }
  for (let run = -2; run < runs / 10; run++) {
    const insertions = new Insertions(benchEvening({ ...shape, seed: 100 + run }));
    const library = libraryLike(shape, 5_000 + run);
    const times = [
      timed(() => library.forEach((tune) => insertions.next(tune))).ms,
      timed(() => library.forEach((tune) => insertions.cheapest(tune))).ms,
    ] as const;
    if (run < 0) continue;
    next.push(times[0]);
    cheapest.push(times[1]);
    pegsOnly += library.filter((tune) => insertions.next(tune)?.levels === null).length;
  }
  const figures = [every, next, cheapest].map((times) =>
    `${short(at(times, 0.5))} ${short(at(times, 0.95))}`.padStart(16),
  );
  console.log(name.padEnd(44), figures.join(' '), `${pegsOnly}`.padStart(8));
}

/** As many tunes as a large circle has, of several evenings' keys and tunings. */
function libraryLike(shape: Omit<EveningShape, 'seed'>, seed: number): EveningTune[] {
  const tunes: EveningTune[] = [];
  for (let part = 0; tunes.length < LIBRARY; part++) {
    const { tunes: drawn } = benchEvening({ ...shape, tunes: 200, seed: seed * 10 + (part % 10) });
    for (const tune of drawn) tunes.push({ ...tune, id: `library ${tunes.length}` });
  }
  return tunes.slice(0, LIBRARY);
}
