import {
  kindNamed,
  understandTune,
  WORD_FIELDS,
  type FileTune,
  type LineProblem,
  type RawTune,
  type TuneFile,
  type WordField,
  type Written,
} from './file-tune';
import { readRecords, type CsvRecord } from './csv-records';
import { unquoteFormula } from './formula-quote';
import { readKeyCells } from './key-cell';

/** What a column holds; null: nothing that is read here. */
type Column =
  | { readonly field: WordField | 'id' | 'key' | 'mode' }
  | { readonly kind: string }
  | { readonly field: null };

/** Nothing in it can be a tune. */
export interface NoTable {
  readonly reason: string;
}

/**
 * The tunes of a table (RFC 4180), one a row. The first row names the columns, in any order and case; a kind's
 * column is named by its id or its name.
 * @param limit at most so many rows are read, and one more
 */
export function readCsv(text: string, limit: number): TuneFile | NoTable {
  const { records, unread } = readRecords(text, limit + 1);
  const [head, ...rows] = records;
  if (!head) return { reason: 'No row of this file can be read.' };
  const columns = head.cells.map((name) => readColumn(unquoteFormula(name)));
  const has = (field: string) => columns.some((column) => 'field' in column && column.field === field);
  if (!has('title') && !has('id')) {
    return { reason: 'The first row has to name the columns; none of them is named title.' };
  }
  const tunes = rows
    .filter(({ cells }) => cells.some((cell) => cell.trim() !== ''))
    .map((row) => readRow(row, columns));
  const lost = unread.map(({ line, message }) => broken(line, message));
  return {
    tunes: [...tunes, ...lost].sort((one, other) => one.line - other.line),
    problems: headProblems(head, columns),
  };
}

function readColumn(name: string): Column {
  const word = name.trim().toLowerCase();
  const field = (['id', 'key', 'mode', ...WORD_FIELDS] as const).find((known) => known === word);
  if (field) return { field };
  const kind = kindNamed(word);
  return kind ? { kind: kind.id } : { field: null };
}

/** Columns that are passed over are told, so that nothing is lost unseen. */
function headProblems({ line, cells }: CsvRecord, columns: readonly Column[]): LineProblem[] {
  const seen = new Set<string>();
  return columns.flatMap((column, index) => {
    const name = cells[index]?.trim().slice(0, 40) ?? '';
    const known = 'kind' in column ? column.kind : column.field;
    if (known === null) {
      return name === '' ? [] : [{ line, message: `The column "${name}" is not known and is left out.` }];
    }
    if (seen.has(known)) return [{ line, message: `The column "${name}" is there twice; the first counts.` }];
    seen.add(known);
    return [];
  });
}

function readRow({ line, cells }: CsvRecord, columns: readonly Column[]): FileTune {
  const problems: LineProblem[] = [];
  if (cells.slice(columns.length).some((cell) => cell.trim() !== '')) {
    problems.push({
      line,
      message: `This row has ${cells.length} cells for ${columns.length} columns: a cell with a comma stands in quotes.`,
    });
  }
  const words: Partial<Record<WordField | 'id' | 'key' | 'mode', Written>> = {};
  const tunings = new Map<string, Written & { readonly kind: string }>();
  columns.forEach((column, index) => {
    const written = { text: unquoteFormula(cells[index] ?? ''), line };
    if ('kind' in column) {
      if (!tunings.has(column.kind)) tunings.set(column.kind, { kind: column.kind, ...written });
    } else if (column.field !== null) words[column.field] ??= written;
  });
  const { id, key: keyCell, mode: modeCell, ...plain } = words;
  const key = readKeyCells(keyCell?.text ?? '', modeCell?.text ?? '');
  if (!key.ok) problems.push({ line, message: key.reason });
  const raw: RawTune = {
    ...{ line, keyLine: line, words: plain, problems, cells: [...tunings.values()] },
    id: id?.text.trim() ?? null,
    ...(key.ok ? key.value : { tonic: null, mode: null }),
  };
  return understandTune(raw);
}

function broken(line: number, message: string): FileTune {
  return {
    ...{ line, title: null, id: null, words: {}, keyLine: line, stated: {} },
    problems: [{ line, message }],
  };
}
