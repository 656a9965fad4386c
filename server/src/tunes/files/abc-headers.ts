import type { AbcLine } from './abc-lines';

export type AbcField = AbcLine & { readonly kind: 'field' };
export type AbcDirective = AbcLine & { readonly kind: 'directive' };

/** Fields of one tune, or of the file, in the order they stand in. */
export interface AbcHeader {
  readonly line: number;
  readonly fields: readonly AbcField[];
  /** Behind the key and before any music, where some programs put a title: they count where `fields` is silent. */
  readonly late: readonly AbcField[];
  readonly directives: readonly AbcDirective[];
  /** The first one: those in the music change the key of a part. */
  readonly key: AbcField | null;
}

/** What stands between two empty lines, or from one `X:` to the next. */
interface Paragraph {
  readonly line: number;
  readonly fields: AbcField[];
  readonly late: AbcField[];
  readonly directives: AbcDirective[];
  key: AbcField | null;
  /** Begins with `X:`. */
  isTune: boolean;
  /** Has music or words before any key. */
  isText: boolean;
  hasMusic: boolean;
}

/**
 * Cuts a file into headers, by ABC 2.1 section 2.2: a tune begins at `X:` and ends at an empty line, its header ends
 * at `K:`; what stands before the first tune is the file's header. Beyond the standard: a paragraph that has `T:`
 * and `K:` is a tune that lost its `X:`, and a header whose lines stand apart by empty ones is put together.
 * @param limit at most so many tunes are read, and one more
 */
export function findHeaders(
  lines: Iterable<AbcLine>,
  limit: number,
): { readonly defaults: AbcHeader; readonly headers: readonly AbcHeader[] } {
  const headers: AbcHeader[] = [];
  let defaults: AbcHeader = emptyParagraph(1);
  for (const paragraph of joined(paragraphs(lines))) {
    if (isTune(paragraph)) headers.push(paragraph);
    else if (headers.length === 0 && !paragraph.isText) defaults = merged(defaults, paragraph);
    if (headers.length > limit) break;
  }
  return { defaults, headers };
}

function isTune({ isTune: begins, isText, key, fields }: Paragraph): boolean {
  return begins || (!isText && key !== null && has(fields, 'T'));
}

function* paragraphs(lines: Iterable<AbcLine>): Generator<Paragraph> {
  let open = emptyParagraph(1);
  for (const line of lines) {
    const begins = line.kind === 'field' && line.letter === 'X';
    if (line.kind === 'empty' || begins) {
      yield open;
      open = emptyParagraph(line.line + (begins ? 0 : 1));
      open.isTune = begins;
    } else if (line.kind === 'directive') open.directives.push(line);
    else if (line.kind === 'other') {
      if (open.key === null && !open.isTune) open.isText = true;
      open.hasMusic = true;
    } else if (line.kind === 'field') {
      if (open.key === null && line.letter === 'K') open.key = line;
      else if (open.key === null) open.fields.push(line);
      // A bar line: `C:|`.
      else if (line.text.startsWith('|')) open.hasMusic = true;
      else if (!open.hasMusic) open.late.push(line);
    }
  }
  yield open;
}

/** A tune without a key goes on behind an empty line, where nothing but more of its header can stand. */
function* joined(all: Iterable<Paragraph>): Generator<Paragraph> {
  let waiting: Paragraph | null = null;
  for (const next of all) {
    if (waiting && isRest(next, waiting)) {
      waiting.fields.push(...next.fields);
      waiting.late.push(...next.late);
      waiting.directives.push(...next.directives);
      waiting.key = next.key;
    } else {
      if (waiting) yield waiting;
      waiting = next;
    }
    if (waiting.isTune && waiting.key === null && !waiting.hasMusic) continue;
    yield waiting;
    waiting = null;
  }
  if (waiting) yield waiting;
}

function isRest(next: Paragraph, tune: Paragraph): boolean {
  const isSecondTitle = has(tune.fields, 'T') && has(next.fields, 'T') && next.key !== null;
  return !next.isTune && !next.isText && !isSecondTitle;
}

function has(fields: readonly AbcField[], letter: string): boolean {
  return fields.some((field) => field.letter === letter);
}

function emptyParagraph(line: number): Paragraph {
  return {
    ...{ line, fields: [], late: [], directives: [], key: null },
    ...{ isTune: false, isText: false, hasMusic: false },
  };
}

function merged(one: AbcHeader, other: AbcHeader): AbcHeader {
  return {
    ...one,
    fields: [...one.fields, ...other.fields],
    directives: [...one.directives, ...other.directives],
  };
}
