import { stringify } from 'csv-stringify/sync';

/**
 * A tune as one line of a table: title, key (with its mode, major unless said), rhythm, parts, what the fiddle
 * and the banjo are tuned to (first choice first, `or` between them, `any`, empty for nothing said) and a note.
 */
export type TuneRow = readonly [
  title: string,
  key: string,
  rhythm: string,
  parts: string,
  fiddle: string,
  banjo: string,
  note?: string,
];

const COLUMNS = ['title', 'key', 'rhythm', 'parts', 'fiddle', 'banjo', 'notes', 'source'];

/** The rows as a file that a host would import. */
export function writeTable(tables: readonly { source: string; rows: readonly TuneRow[] }[]): Buffer {
  const rows = tables.flatMap(({ source, rows }) =>
    rows.map(([title, key, rhythm, parts, fiddle, banjo, note = '']) => [
      ...[title, key, rhythm, parts, fiddle, banjo, note, source],
    ]),
  );
  return Buffer.from(stringify([COLUMNS, ...rows]));
}
