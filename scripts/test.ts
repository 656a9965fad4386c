import { mkdirSync, readFileSync, rmSync } from 'node:fs';
import path from 'node:path';
import { findBrowser } from './browser';
import { isEnding } from './ending';
import { CACHE } from './places';
import { findPoppler } from './poppler';
import { say, Sentence } from './sentence';
import { ONE_FAILED, sum, type Counts } from './test-report';
import { PARTS, STEPS, type Part, type Step } from './test-steps';
import { throwawayDatabase } from './throwaway-database';

const LOGS = path.join(CACHE, 'test');
const LANES = 2;

type Wish = { readonly parts: readonly Part[]; readonly filters: readonly string[] };

/** `--only server,e2e` names parts; other words go to jest and vitest, which take them as names of files. */
function parseWords(words: readonly string[]): Wish {
  const at = words.indexOf('--only');
  if (at === -1) return { parts: PARTS, filters: words };
  const named = (words[at + 1] ?? '').split(',');
  const parts = PARTS.filter((part) => named.includes(part));
  if (parts.length < named.length) {
    throw new Sentence(`--only takes parts separated by commas: ${PARTS.join(', ')}.`);
  }
  return { parts, filters: words.filter((_, i) => i !== at && i !== at + 1) };
}

/** Tests never see the person's own database or settings. */
async function environment(parts: readonly Part[]): Promise<NodeJS.ProcessEnv> {
  const own = Object.entries(process.env).filter(
    ([name]) => !/^(PEGWELL_|PG)/.test(name) && !['DATABASE_URL', 'PORT', 'NODE_ENV'].includes(name),
  );
  const needsDatabase = parts.includes('server') || parts.includes('e2e');
  if (parts.includes('server')) await findPoppler();
  return {
    ...Object.fromEntries(own),
    CI: 'true',
    ...(parts.includes('e2e') && { PEGWELL_CHROMIUM: await findBrowser() }),
    ...(needsDatabase && { PEGWELL_TEST_DATABASE_URL: await throwawayDatabase() }),
  };
}

function chosen(parts: readonly Part[]): readonly Step[] {
  const needed = STEPS.filter((step) => parts.includes(step.part)).flatMap((step) => step.after ?? []);
  return STEPS.filter(
    (step) =>
      parts.includes(step.part) ||
      needed.includes(step.name) ||
      // What the server is built on, for those who ask for the journeys alone.
      (step.name === 'build shared' && needed.includes('build server')),
  );
}

/** Runs all steps: the small ones in two lanes, then each big one by itself. */
async function runSteps(steps: readonly Step[], env: NodeJS.ProcessEnv, filters: readonly string[]) {
  const results = new Map<string, Counts>();
  const work = async (step: Step): Promise<void> => {
    const missing = (step.after ?? []).filter((name) => results.get(name)?.failed !== 0);
    const begun = Date.now();
    const file = path.join(LOGS, step.name.replaceAll(' ', '-'));
    const bench = { log: `${file}.log`, report: `${file}.json`, env, filters };
    const counts = missing.length > 0 ? ONE_FAILED : await step.work(bench);
    if (isEnding()) return;
    results.set(step.name, counts);
    if (missing.length > 0) say(`FAIL  ${step.name}: not tried, because "${missing.join('", "')}" failed`);
    else tell(step.name, counts, Date.now() - begun, bench.log);
  };
  await inLanes(
    steps.filter((step) => !step.alone),
    results,
    work,
  );
  for (const step of steps.filter((s) => s.alone)) await work(step);
  return results;
}

/** Each lane takes the first waiting step whose forerunners are over, until none is left. */
async function inLanes(
  steps: readonly Step[],
  over: ReadonlyMap<string, Counts>,
  work: (step: Step) => Promise<void>,
): Promise<void> {
  const waiting = [...steps];
  const underWay = new Set<Promise<void>>();
  const lane = async (): Promise<void> => {
    while (waiting.length > 0 && !isEnding()) {
      const at = waiting.findIndex((step) => (step.after ?? []).every((name) => over.has(name)));
      const [step] = at === -1 ? [] : waiting.splice(at, 1);
      if (!step) {
        // What is waited for is under way in the other lane. Only that: what is over would be awaited in a ring.
        await Promise.race(underWay);
        continue;
      }
      const done = work(step);
      underWay.add(done);
      await done.finally(() => underWay.delete(done));
    }
  };
  await Promise.all(Array.from({ length: LANES }, lane));
}

function tell(name: string, { passed, failed, skipped }: Counts, milliseconds: number, log: string): void {
  const skips = skipped > 0 ? `, ${skipped} skipped` : '';
  if (failed > 0)
    say(`\n----- ${name} -----\n${readFileSync(log, 'utf8').trimEnd()}\n----- end of ${name} -----\n`);
  const seconds = (milliseconds / 1000).toFixed(1);
  say(`${failed > 0 ? 'FAIL' : 'ok  '}  ${name}: ${passed} passed, ${failed} failed${skips} (${seconds} s)`);
}

/**
 * Checks everything, or the parts named.
 * @returns the exit code: 0 when nothing failed. The last line says `N passed, N failed`.
 */
export async function test(words: readonly string[]): Promise<number> {
  const { parts, filters } = parseWords(words);
  rmSync(LOGS, { recursive: true, force: true });
  mkdirSync(LOGS, { recursive: true });
  const steps = chosen(parts);
  const results = await runSteps(steps, await environment(parts), filters);
  // Interrupted: what was not tried is neither passed nor failed.
  if (isEnding()) return 1;
  say();
  for (const part of PARTS) {
    const ran = steps
      .filter((step) => step.part === part)
      .map((step) => results.get(step.name) ?? ONE_FAILED);
    if (ran.length === 0) continue;
    const { passed, failed } = sum(ran);
    say(`${part.padEnd(8)}${passed} passed, ${failed} failed`);
  }
  const { passed, failed } = sum([...results.values()]);
  say(`${passed} passed, ${failed} failed`);
  return failed === 0 ? 0 : 1;
}
