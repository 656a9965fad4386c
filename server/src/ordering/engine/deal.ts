import type { Stage } from './stage';

/**
 * The same for a stage that does not see spaced rhythms: members are dealt so that two of a spaced rhythm do
 * not come to stand together, as far as it can be had by taking the one that is more left first.
 */
export function dealtApart(
  stage: Stage,
  order: readonly number[],
  isSpaced: (unit: number) => boolean,
): number[] {
  const { plan } = stage;
  const plainLeft = stage.members.map((members) => members.filter((unit) => !isSpaced(unit)).reverse());
  const spacedLeft = stage.members.map((members) => members.filter(isSpaced).reverse());
  const entries: number[] = [];
  let afterSpaced = false;
  for (const unit of order) {
    const c = stage.classOf[unit]!;
    let taken = unit;
    if (c !== -1) {
      if (plan.setStart[entries.length]) afterSpaced = false;
      const wantsPlain = afterSpaced || spacedLeft[c]!.length === 0;
      taken =
        (wantsPlain ? plainLeft[c]!.pop() : spacedLeft[c]!.pop()) ??
        plainLeft[c]!.pop() ??
        spacedLeft[c]!.pop()!;
    }
    entries.push(...plan.units[taken]!.entries);
    afterSpaced = isSpaced(taken);
  }
  return entries;
}

/**
 * From units in playing order, of which each stands for its class, to entries: whoever can keep the host's
 * position does; the rest follow in the host's order.
 *
 * @returns entries (indices in the host's order) in playing order
 */
export function dealt(stage: Stage, order: readonly number[]): number[] {
  const { plan } = stage;
  const waiting = stage.members.map((members) => new Set(members));
  const entries = new Array<number>(plan.setStart.length).fill(-1);
  const open: { unit: number; position: number }[] = [];
  let position = 0;
  for (const unit of order) {
    const c = stage.classOf[unit]!;
    const host = plan.unitOf[position]!;
    const keeps = c !== -1 && waiting[c]!.has(host) && plan.units[host]!.entries[0] === position;
    if (c === -1 || keeps) place(c === -1 ? unit : host, position);
    else open.push({ unit, position });
    position += plan.units[unit]!.entries.length;
  }
  for (const { unit, position: at } of open) {
    const [next] = waiting[stage.classOf[unit]!]!;
    place(next!, at);
  }
  return entries;

  function place(unit: number, at: number): void {
    plan.units[unit]!.entries.forEach((entry, index) => (entries[at + index] = entry));
    const c = stage.classOf[unit]!;
    if (c !== -1) waiting[c]!.delete(unit);
  }
}
