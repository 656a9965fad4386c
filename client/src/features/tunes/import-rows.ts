import type { ImportAction, ImportReport } from '@pegwell/shared/contract/tunes';

export interface ImportRow extends Pick<
  ImportReport['tunes'][number],
  'line' | 'title' | 'key' | 'mode' | 'tunings' | 'found' | 'alike'
> {
  readonly action: ImportAction;
  /** Why it is left out; empty otherwise. */
  readonly reasons: readonly string[];
}

export interface ImportRows {
  readonly rows: readonly ImportRow[];
  /** What concerns the file and no tune of it. */
  readonly notes: readonly { readonly line: number; readonly message: string }[];
}

/**
 * A report line by line. A problem belongs to the tune that is left out and begins at its line or above it,
 * before the next tune: a key may be wrong some lines below its tune's first.
 */
export function importRows({ tunes, problems }: ImportReport): ImportRows {
  const sorted = [...tunes].sort((a, b) => a.line - b.line);
  const reasons = new Map<(typeof tunes)[number], string[]>();
  const notes: { line: number; message: string }[] = [];
  let at = -1;
  for (const { line, message } of [...problems].sort((a, b) => a.line - b.line)) {
    for (let next = sorted[at + 1]; next && next.line <= line; next = sorted[at + 1]) at++;
    const tune = sorted[at];
    if (tune?.action === 'skip') reasons.set(tune, [...(reasons.get(tune) ?? []), message]);
    else notes.push({ line, message });
  }
  return {
    notes,
    rows: sorted.map((tune) => ({ ...tune, reasons: reasons.get(tune) ?? [] })),
  };
}
