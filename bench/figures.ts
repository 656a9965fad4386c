/** Milliseconds of the processor that some work takes: what else runs on the machine matters less. */
export function timed<T>(work: () => T): { readonly result: T; readonly ms: number } {
  const begun = process.cpuUsage().user;
  const result = work();
  return { result, ms: (process.cpuUsage().user - begun) / 1000 };
}

/** The value below which a share of all values lies. */
export function at(values: readonly number[], share: number): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.min(sorted.length - 1, Math.floor(share * sorted.length))]!;
}

/** `0.4`, `12`: as many digits as a figure is good for. */
export const short = (value: number): string => (value < 10 ? value.toFixed(1) : value.toFixed(0));

/** A row of a Markdown table. */
export const row = (...cells: readonly string[]): string => `| ${cells.join(' | ')} |`;
