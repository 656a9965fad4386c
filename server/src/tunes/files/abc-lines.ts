import { textLines } from './text-lines';

/** What a line of an ABC file is, as far as headers go (ABC 2.1 sections 2 and 3). */
export type AbcLine =
  /** Nothing, or nothing but white space (2.2.4). */
  | { readonly kind: 'empty'; readonly line: number }
  /** `X:1`: the text still with its escapes, without comment and surrounding space. */
  | { readonly kind: 'field'; readonly line: number; readonly letter: string; readonly text: string }
  /** `%%name text`, or `I:name text`. */
  | { readonly kind: 'directive'; readonly line: number; readonly name: string; readonly text: string }
  | { readonly kind: 'comment'; readonly line: number }
  /** Music or free text. */
  | { readonly kind: 'other'; readonly line: number };

type Continued = Extract<AbcLine, { readonly kind: 'field' } | { readonly kind: 'directive' }>;

/** Characters of a line that are read: far more than the longest note needs, all of it escaped. */
const LONGEST = 40_000;
// `s`: line separators of Unicode are no line ends here. Indented headers are no part of the standard.
const FIELD = /^([A-Za-z]|\s+[A-Z]):(.*)$/s;
const DIRECTIVE = /^(?:%%|I:)\s*(\S+)\s*(.*)$/s;
const COMMENT = /(?<!\\)(?:\\\\)*%/;
const COMMENT_BEHIND_TITLE = /(?<![\\\d])(?:\\\\)*%/;

/**
 * Lines from 1, with `+:` joined by a space to the field, or the `I:` directive, that it continues; comments and
 * `%%` directives may stand between (section 3.3).
 */
export function* readAbcLines(text: string): Generator<AbcLine> {
  // What a `+:` would continue, held back until something else comes.
  let open: Continued | null = null;
  // Comments and directives behind it.
  let behind: AbcLine[] = [];
  for (const [number, whole] of textLines(text)) {
    const raw = whole.slice(0, LONGEST);
    if (raw.startsWith('+:') && open !== null) {
      open = continued(open, raw.slice(2));
      continue;
    }
    const line = readLine(raw, number);
    const opens = line.kind === 'field' || (line.kind === 'directive' && raw.startsWith('I:'));
    const closes = opens || line.kind === 'empty' || line.kind === 'other';
    if (open !== null && !closes) {
      behind.push(line);
      continue;
    }
    if (open !== null) yield* [open, ...behind];
    behind = [];
    open = opens ? line : null;
    if (!opens) yield line;
  }
  if (open !== null) yield* [open, ...behind];
}

function continued(field: Continued, more: string): Continued {
  if (field.text.length >= LONGEST) return field;
  const said = withoutComment(more, field.kind === 'field' ? field.letter : null);
  return { ...field, text: `${field.text} ${said}`.trim() };
}

function readLine(raw: string, line: number): AbcLine {
  if (raw.trim() === '') return { kind: 'empty', line };
  const [, name = null, value = ''] = DIRECTIVE.exec(raw) ?? [];
  if (name !== null)
    return { kind: 'directive', line, name: name.toLowerCase(), text: withoutComment(value) };
  // Also behind white space (2.2.5): it leaves no empty line.
  if (raw.trimStart().startsWith('%')) return { kind: 'comment', line };
  const [, indented = null, text = ''] = FIELD.exec(raw) ?? [];
  if (indented === null) return { kind: 'other', line };
  const letter = indented.trim();
  return { kind: 'field', line, letter, text: withoutComment(text, letter) };
}

/**
 * `%` begins a comment (2.2.5) unless it is escaped: an odd number of backslashes before it (8.2). In a title it
 * is a percent sign where it follows a digit, which people do not escape: `T:The 50% Reel`.
 */
function withoutComment(text: string, letter: string | null = null): string {
  const match = (letter === 'T' ? COMMENT_BEHIND_TITLE : COMMENT).exec(text);
  return (match ? text.slice(0, match.index + match[0].length - 1) : text).trim();
}
