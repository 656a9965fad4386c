import { modeNamed } from './mode-word';
import { kindNamed, WORD_FIELDS, type LineProblem, type WordField } from './file-tune';
import { readKeyCells } from './key-cell';

/** What a column holds; null: nothing that is read here. `tuning` says no kind, so it only proposes. */
export type Column =
  | { readonly field: WordField | 'id' | 'key' | 'mode' | 'tuning' }
  | { readonly kind: string }
  | { readonly field: null };

const FIELDS = ['id', 'key', 'mode', 'tuning', ...WORD_FIELDS] as const;

/** What people name columns, where none has the name that the export gives it. */
const OTHER_NAMES: Readonly<Record<string, (typeof FIELDS)[number]>> = {
  name: 'title',
  tune: 'title',
  'tune name': 'title',
  'tune title': 'title',
  tonic: 'key',
  type: 'rhythm',
  'tune type': 'rhythm',
  form: 'parts',
  author: 'composer',
  'learned from': 'source',
  'learnt from': 'source',
  note: 'notes',
  comment: 'notes',
  comments: 'notes',
  tunings: 'tuning',
};

/** The columns as the first row names them, in any order and case. */
export function readColumns(names: readonly string[]): Column[] {
  const exact = names.map(readColumn);
  const taken = new Set(exact.flatMap((column) => ('field' in column && column.field ? [column.field] : [])));
  return exact.map((column, index) => {
    if (!('field' in column) || column.field !== null) return column;
    const word = plain(names[index] ?? '');
    const other = Object.hasOwn(OTHER_NAMES, word) ? OTHER_NAMES[word] : undefined;
    return other === undefined || taken.has(other) ? column : { field: other };
  });
}

function readColumn(name: string): Column {
  const word = plain(name);
  const field = FIELDS.find((known) => known === word);
  if (field) return { field };
  const kind = kindNamed(word.replace(/ tunings?$/, ''));
  return kind ? { kind: kind.id } : { field: null };
}

function plain(name: string): string {
  return name
    .trim()
    .toLowerCase()
    .replace(/[\s_]+/g, ' ');
}

/** Rows that a guess looks at. */
const SAMPLE = 100;
/** Cells of a column that have to fit, of those that are not empty: people leave odd ones. */
const ENOUGH = 0.8;

/**
 * The columns of a table whose first row names none: a column of keys, and before or behind it one of titles,
 * perhaps one of modes.
 * @returns null where there are no such columns: then it is no list of tunes
 */
export function guessColumns(rows: readonly (readonly string[])[]): Column[] | null {
  const sample = rows.slice(0, SAMPLE);
  const width = Math.max(0, ...sample.map((row) => row.length));
  const columns: Column[] = Array.from({ length: width }, () => ({ field: null }));
  const find = (fits: (cell: string) => boolean): number =>
    columns.findIndex((column, at) => {
      if (!('field' in column) || column.field !== null) return false;
      const cells = sample.map((row) => row[at]?.trim() ?? '').filter((cell) => cell !== '');
      return cells.length * 2 >= sample.length && cells.filter(fits).length >= cells.length * ENOUGH;
    });
  const key = find((cell) => readKeyCells(cell, '').ok);
  if (key === -1) return null;
  columns[key] = { field: 'key' };
  const title = find((cell) => /\p{L}\p{L}/u.test(cell) && modeNamed(cell) === null);
  if (title === -1) return null;
  columns[title] = { field: 'title' };
  const mode = find((cell) => modeNamed(cell) !== null);
  if (mode !== -1) columns[mode] = { field: 'mode' };
  return columns;
}

/** What a table's host has to know of its columns; what is passed over is told, so that nothing is lost unseen. */
export function columnProblems(
  line: number,
  names: readonly string[],
  columns: readonly Column[],
): LineProblem[] {
  const seen = new Set<string>();
  return columns.flatMap((column, index) => {
    const name = names[index]?.trim().slice(0, 40) ?? '';
    const known = 'kind' in column ? column.kind : column.field;
    if (known === null) {
      return name === '' ? [] : [{ line, message: `The column "${name}" is not known and is left out.` }];
    }
    if (seen.has(known)) return [{ line, message: `The column "${name}" is there twice; the first counts.` }];
    seen.add(known);
    return [];
  });
}

/** The same for columns that were guessed. */
export function guessProblem(line: number, columns: readonly Column[]): LineProblem {
  const read = columns.flatMap((column, at) =>
    'field' in column && column.field !== null ? [`column ${at + 1} as ${column.field}`] : [],
  );
  const rest = read.length < columns.length ? ' The others are left out.' : '';
  return { line, message: `The first row names no columns: ${read.join(', ')}.${rest}` };
}
