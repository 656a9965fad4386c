import type { TuneFileFormat } from '@pegwell/shared/contract/tunes';
import { readColumns } from './csv-columns';

/** What pasted words are: ABC where a line begins a tune or gives a key, a table where tabs or names of columns say so. */
export function formatOfPasted(text: string): TuneFileFormat | 'list' {
  if (/^\s*X:\s*\d*\s*$/m.test(text) || (/^\s*T:/m.test(text) && /^\s*K:/m.test(text))) return 'abc';
  const lines = text.split(/\r\n|\n|\r/).filter((line) => line.trim() !== '');
  const [first = ''] = lines;
  const named = readColumns(first.split(/[,;\t]/)).filter(
    (column) => 'field' in column && column.field !== null,
  );
  if (named.some((column) => 'field' in column && (column.field === 'title' || column.field === 'key')))
    return 'csv';
  // Copied from a spreadsheet: cells arrive with tabs between.
  return lines.filter((line) => line.includes('\t')).length * 2 > lines.length ? 'csv' : 'list';
}
