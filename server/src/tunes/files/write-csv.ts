import { stringify } from 'csv-stringify/sync';
import { BUILT_IN_KINDS } from '@pegwell/shared/music/instrument';
import type { StoredTune } from '../tune-content';
import { quoteFormula } from './formula-quote';
import { showCell } from './show-cell';

const COLUMNS = [
  ...['id', 'title', 'key', 'mode', 'rhythm', 'parts', 'composer', 'source', 'notes'],
  ...BUILT_IN_KINDS.map(({ id }) => id),
];

/** The library as a table of RFC 4180 in UTF-8, a column per kind. Importing it again changes nothing. */
export function writeCsv(tunes: readonly StoredTune[]): string {
  const rows = tunes.map((tune) => {
    const { id, title, key, mode, rhythm, parts, composer, source, notes, stated } = tune;
    const words = [id, title, key, mode, rhythm, parts, composer, source, notes];
    const tunings = BUILT_IN_KINDS.map((kind) => {
      const accepted = stated[kind.id];
      return accepted === undefined ? '' : showCell(kind, accepted);
    });
    return [...words, ...tunings].map((cell) => quoteFormula(cell ?? ''));
  });
  // Any line end inside a cell needs quotes, not only the one that ends rows.
  return stringify([COLUMNS, ...rows], { record_delimiter: '\r\n', quoted_match: /[\r\n]/ });
}
