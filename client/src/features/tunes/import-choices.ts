import type { ImportChoice } from '@pegwell/shared/contract/import-choices';
import type { ImportReport } from '@pegwell/shared/contract/tunes';

/** What a host said to tunes of a file, by line; lines that nothing was said to are as planned. */
export type ImportChoices = ReadonlyMap<number, ImportChoice>;

export const NO_CHOICES: ImportChoices = new Map();

export const choiceOf = (choices: ImportChoices, line: number): ImportChoice =>
  choices.get(line) ?? { line, found: [], alike: 'keep' };

export function choose(choices: ImportChoices, choice: ImportChoice): ImportChoices {
  return new Map(choices).set(choice.line, choice);
}

/** Every tuning that was found in words, taken or not; what was said to likely duplicates stays. */
export function takeAllFound(choices: ImportChoices, { tunes }: ImportReport, taken: boolean): ImportChoices {
  const all = new Map(choices);
  for (const { line, found } of tunes) {
    if (found)
      all.set(line, { ...choiceOf(choices, line), found: taken ? found.map(({ kind }) => kind) : [] });
  }
  return all;
}

/** How many tunings were found in words, and how many of them are taken. */
export function countFound(choices: ImportChoices, { tunes }: ImportReport) {
  let found = 0;
  let taken = 0;
  for (const tune of tunes) {
    found += tune.found?.length ?? 0;
    if (tune.found) taken += choiceOf(choices, tune.line).found.length;
  }
  return { found, taken };
}

/** How many tunes the import writes: new ones that are not left out, changed ones, and those that a tuning changes. */
export function countWrites(choices: ImportChoices, { created, updated, tunes }: ImportReport): number {
  let writes = created + updated;
  for (const { line, action } of tunes) {
    const choice = choices.get(line);
    if (action === 'create' && choice?.alike === 'skip') writes--;
    if (action === 'unchanged' && choice && choice.found.length > 0) writes++;
  }
  return writes;
}
