import { setTimeout as wait } from 'node:timers/promises';
import { isEnding } from './ending';

/** Where a server that listens on `host` can be asked from here. */
export function reachableAt(host: string, port: number): string {
  const name = host === '0.0.0.0' ? '127.0.0.1' : host === '::' ? '::1' : host;
  return `http://${name.includes(':') ? `[${name}]` : name}:${port}`;
}

async function answers(address: string): Promise<boolean> {
  try {
    return (await fetch(address, { signal: AbortSignal.timeout(2_000) })).ok;
  } catch {
    return false;
  }
}

/** Waits until an address answers well; false when everything ends before. */
export async function untilItAnswers(address: string): Promise<boolean> {
  while (!isEnding()) {
    if (await answers(address)) return true;
    await wait(100);
  }
  return false;
}
