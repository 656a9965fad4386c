import { columnProblems, guessColumns, guessProblem, readColumns, type Column } from './csv-columns';
import { readRecords, type CsvRecord } from './csv-records';
import {
  understandTune,
  type FileTune,
  type LineProblem,
  type RawTune,
  type TuneFile,
  type WordField,
  type Written,
} from './file-tune';
import { unquoteFormula } from './formula-quote';
import { readKeyCells } from './key-cell';

/** Nothing in it can be a tune. */
export interface NoTable {
  readonly reason: string;
}

/**
 * The tunes of a table (RFC 4180), one a row. The first row names the columns; where it names none that is known,
 * they are told by what stands in them.
 * @param limit at most so many rows are read, and one more
 */
export function readCsv(text: string, limit: number): TuneFile | NoTable {
  const { records, unread } = readRecords(text, limit + 1);
  const [head] = records;
  if (!head) return { reason: 'No row of this file can be read.' };
  const names = head.cells.map(unquoteFormula);
  const named = readColumns(names);
  const isHead = named.some((column) => 'kind' in column || column.field !== null);
  const columns = isHead ? named : guessColumns(records.map(({ cells }) => cells));
  if (columns === null) {
    return {
      reason: 'This is no list of tunes: the first row has to name the columns, and none is named title.',
    };
  }
  if (!has(columns, 'title') && !has(columns, 'id')) {
    return { reason: 'The first row has to name the columns; none of them is named title.' };
  }
  const tunes = records
    .slice(isHead ? 1 : 0)
    .filter(({ cells }) => cells.some((cell) => cell.trim() !== ''))
    .map((row) => readRow(row, columns));
  const problems = isHead ? columnProblems(head.line, names, columns) : [guessProblem(head.line, columns)];
  if (records.length > 1 && tunes.length === 0) {
    problems.push({ line: head.line + 1, message: 'All rows under the first are empty.' });
  }
  const lost = unread.map(({ line, message }) => broken(line, message));
  return {
    tunes: [...tunes, ...lost].sort((one, other) => one.line - other.line),
    problems,
  };
}

function has(columns: readonly Column[], field: string): boolean {
  return columns.some((column) => 'field' in column && column.field === field);
}

function readRow({ line, cells }: CsvRecord, columns: readonly Column[]): FileTune {
  const problems: LineProblem[] = [];
  if (cells.slice(columns.length).some((cell) => cell.trim() !== '')) {
    problems.push({
      line,
      message: `This row has ${cells.length} cells for ${columns.length} columns: a cell with a comma stands in quotes.`,
    });
  }
  const words: Partial<Record<WordField | 'id' | 'key' | 'mode' | 'tuning', Written>> = {};
  const tunings = new Map<string, Written & { readonly kind: string }>();
  columns.forEach((column, index) => {
    const written = { text: unquoteFormula(cells[index] ?? ''), line };
    if ('kind' in column) {
      if (!tunings.has(column.kind)) tunings.set(column.kind, { kind: column.kind, ...written });
    } else if (column.field !== null) words[column.field] ??= written;
  });
  const { id, key: keyCell, mode: modeCell, tuning, ...plain } = words;
  const key = readKeyCells(keyCell?.text ?? '', modeCell?.text ?? '');
  if (!key.ok) problems.push({ line, message: key.reason });
  const raw: RawTune = {
    ...{ line, keyLine: line, words: plain, problems, cells: [...tunings.values()] },
    id: id?.text.trim() ?? null,
    hints: tuning ? [tuning] : [],
    ...(key.ok ? key.value : { tonic: null, mode: null }),
  };
  return understandTune(raw);
}

function broken(line: number, message: string): FileTune {
  return {
    ...{ line, title: null, id: null, words: {}, keyLine: line, stated: {}, found: [], plainTitle: null },
    problems: [{ line, message }],
  };
}
