import { placed, type World } from './world';
import type { Recipe } from './recipe';

/** What came back, and whether that is how a server behaves. */
export interface Outcome {
  readonly status: number;
  readonly millis: number;
  /** Null where nothing is wrong. */
  readonly fault: string | null;
}

/** Nobody waits longer in a noisy hall. */
const LONGEST_MS = 2_000;

/** Tries before a slow answer counts: what is slow by itself is slow each time, a busy machine is not. */
const TRIES = 3;

export async function send(url: string, recipe: Recipe, world: World): Promise<Outcome> {
  let outcome = await sendOnce(url, recipe, world);
  for (let tries = 1; tries < TRIES && outcome.millis > LONGEST_MS && outcome.status < 500; tries++) {
    outcome = await sendOnce(url, recipe, world);
  }
  return outcome;
}

async function sendOnce(url: string, recipe: Recipe, world: World): Promise<Outcome> {
  const { method, caller, headers } = recipe;
  const query = new URLSearchParams(recipe.query.map(([name, value]) => [name, wellFormed(value)]));
  const address = `${url}${placed(recipe.path, world)}?${query.toString()}`;
  const { body, type } = bodyOf(recipe, world);
  const begun = performance.now();
  const answer = await fetch(address, {
    method,
    headers: { cookie: world.cookies[caller], ...(type && { 'content-type': type }), ...headers },
    ...(method !== 'GET' && body !== null && { body }),
    redirect: 'manual',
  });
  const text = await answer.text();
  const millis = performance.now() - begun;
  return { status: answer.status, millis, fault: faultOf(answer, text, millis) };
}

function faultOf(answer: Response, text: string, millis: number): string | null {
  if (answer.status >= 500) return `answered ${answer.status}: ${text.slice(0, 300)}`;
  if (millis > LONGEST_MS) return `took ${Math.round(millis)} ms`;
  if (answer.headers.get('x-content-type-options') !== 'nosniff') return 'came without nosniff';
  if (answer.status < 400) return null;
  if (!answer.headers.get('content-type')?.startsWith('application/problem+json')) {
    return `refused with ${answer.status} and no problem document: ${text.slice(0, 300)}`;
  }
  // A stack, or a word of the database's.
  return /node_modules|\n {4}at |select |insert into|syntax error/.test(text)
    ? `told too much: ${text.slice(0, 300)}`
    : null;
}

function bodyOf({ body }: Recipe, world: World): { body: string | FormData | null; type?: string } {
  if (body === null) return { body: null };
  if ('raw' in body) return { body: body.raw, type: 'application/json' };
  if ('json' in body) return { body: placed(JSON.stringify(body.json), world), type: 'application/json' };
  const form = new FormData();
  form.append('file', new Blob([wellFormed(body.file)]), body.name);
  return { body: form };
}

/** A half of a surrogate pair cannot stand in an address at all. */
function wellFormed(text: string): string {
  return text.replace(/\p{Cs}/gu, '\ufffd');
}
