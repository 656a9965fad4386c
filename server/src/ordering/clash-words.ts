import type { ClashingRule } from './engine/ordering-problem';

/**
 * Rules that cannot all hold, in a sentence: "Slack Tide is pinned to place 3, and Stone Weir comes before
 * Slack Tide: these cannot all hold."
 * @param nameOf how a tune is called there: its title, or its label
 * @param placeOf the position of a pinned tune, counted from 0
 */
export function clashSentence(
  clashes: readonly ClashingRule[],
  nameOf: (id: string) => string,
  placeOf: (id: string) => number | undefined,
): string {
  const words = clashes.map(({ rule, ids }) => {
    const names = ids.map(nameOf);
    if (rule === 'pin') return `${names[0]} is pinned to place ${(placeOf(ids[0] ?? '') ?? 0) + 1}`;
    if (rule === 'before') return `${names[0]} comes before ${names[1]}`;
    return `${names.join(', ')} are one medley`;
  });
  const last = words.at(-1) ?? '';
  const list = words.length > 1 ? `${words.slice(0, -1).join(', ')}, and ${last}` : last;
  return words.length > 1 ? `${list}: these cannot all hold.` : `${list}, and that cannot be.`;
}
