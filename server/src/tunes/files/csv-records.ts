import { CsvError, parse } from 'csv-parse/sync';

export interface CsvRecord {
  /** Where it begins, from 1. */
  readonly line: number;
  readonly cells: readonly string[];
}

/** A record whose quote is never closed, or which cannot be told from the rest of the file. */
export interface UnreadRecord {
  readonly line: number;
  readonly message: string;
}

interface Chunk {
  readonly record: string[];
  /** Where it ends. Its `lines` are of no use: line ends of two signs count twice in them. */
  readonly info: { readonly bytes: number };
}

/** Unclosed quotes that are recovered from; each costs one more reading of the rest, so many bytes at most. */
const MOST_RECOVERIES = 20;
const MOST_READ_AGAIN = 16 * 1024 * 1024;
const LINE_END = /\r\n|\n|\r/g;

/**
 * Records of RFC 4180, empty lines left out. More lenient than it: any line end, and quotes inside an unquoted
 * cell. Where a quote is never closed only its own line is given up, and reading goes on behind it.
 * @param limit at most so many records are read, and one more
 */
export function readRecords(
  text: string,
  limit: number,
): { readonly records: readonly CsvRecord[]; readonly unread: readonly UnreadRecord[] } {
  const records: CsvRecord[] = [];
  const unread: UnreadRecord[] = [];
  // Some spreadsheets write what parts their cells into a line of its own.
  const [stated = '', sign] = /^sep=([,;\t])\s*?(?:\r\n|\n|\r)/.exec(text) ?? [];
  const delimiter = sign ?? delimiterOf(text);
  let rest = Buffer.from(text.slice(stated.length));
  // Lines before `rest`, then before the record that is read next.
  let lines = stated === '' ? 0 : 1;
  let readAgain = 0;
  while (rest.length > 0 && records.length <= limit) {
    let bytes = 0;
    const on_record = (chunk: unknown): null => {
      const { record, info } = chunk as Chunk;
      const [empty, own] = leadingLineEnds(rest.toString('utf8', bytes, info.bytes));
      records.push({ line: lines + countLineEnds(empty) + 1, cells: record });
      lines += countLineEnds(empty) + countLineEnds(own);
      bytes = info.bytes;
      return null;
    };
    try {
      parse(rest, {
        ...{ delimiter, record_delimiter: ['\r\n', '\n', '\r'], to: limit + 1 - records.length },
        ...{ relax_column_count: true, relax_quotes: true, skip_empty_lines: true, info: true, on_record },
      });
      break;
    } catch (error) {
      if (!(error instanceof CsvError)) throw error;
      // The record that broke begins behind the last that was read, perhaps after empty lines.
      const [empty, behind] = leadingLineEnds(rest.toString('utf8', bytes));
      const own = /^[^\r\n]*(?:\r\n|\n|\r)?/.exec(behind)?.[0] ?? '';
      lines += countLineEnds(empty) + 1;
      unread.push({ line: lines, message: 'A quote (") is opened and never closed.' });
      rest = Buffer.from(behind.slice(own.length));
      readAgain += rest.length;
      const isEnough = unread.length === MOST_RECOVERIES || readAgain > MOST_READ_AGAIN;
      if (isEnough && rest.length > 0) {
        unread.push({ line: lines + 1, message: 'From here on too many quotes are left open to go on.' });
        break;
      }
    }
  }
  return { records, unread };
}

function leadingLineEnds(text: string): [empty: string, rest: string] {
  const empty = /^[\r\n]*/.exec(text)?.[0] ?? '';
  return [empty, text.slice(empty.length)];
}

function countLineEnds(text: string): number {
  return text.match(LINE_END)?.length ?? 0;
}

/** The comma; or what spreadsheets in other languages put in its place, when the first line has more of those. */
function delimiterOf(text: string): string {
  const first = /^\s*([^\r\n]*)/.exec(text)?.[1]?.replace(/"[^"]*"/g, '') ?? '';
  const counts = [',', ';', '\t'].map((sign) => ({ sign, count: first.split(sign).length }));
  return counts.reduce((most, other) => (other.count > most.count ? other : most)).sign;
}
