/** What a line of an ABC file is, as far as headers go (ABC 2.1 sections 2 and 3). */
export type AbcLine =
  | { readonly kind: 'empty'; readonly line: number }
  /** `X:1`: the text still with its escapes, without comment and surrounding space. */
  | { readonly kind: 'field'; readonly line: number; readonly letter: string; readonly text: string }
  /** `%%name text`, or `I:name text`. */
  | { readonly kind: 'directive'; readonly line: number; readonly name: string; readonly text: string }
  | { readonly kind: 'comment'; readonly line: number }
  /** Music or free text. */
  | { readonly kind: 'other'; readonly line: number };

// `s`: line separators of Unicode are no line ends here.
const FIELD = /^([A-Za-z]):(.*)$/s;
const DIRECTIVE = /^(?:%%|I:)\s*(\S+)\s*(.*)$/s;
const COMMENT = /(?<!\\)(?:\\\\)*%/;

/** Lines from 1, with `+:` joined to the field that it continues (section 3.3), by a space. */
export function readAbcLines(text: string): AbcLine[] {
  const lines: AbcLine[] = [];
  // Where in `lines` the field stands that a `+:` would continue.
  let open: number | null = null;
  text.split(/\r\n|\n|\r/).forEach((raw, index) => {
    const continued = raw.startsWith('+:') && open !== null ? lines[open] : undefined;
    if (continued?.kind === 'field' && open !== null) {
      const more = withoutComment(raw.slice(2));
      lines[open] = { ...continued, text: `${continued.text} ${more}`.trim() };
      return;
    }
    const line = readLine(raw, index + 1);
    if (line.kind === 'field') open = lines.length;
    else if (line.kind !== 'comment') open = null;
    lines.push(line);
  });
  return lines;
}

function readLine(raw: string, line: number): AbcLine {
  if (raw.trim() === '') return { kind: 'empty', line };
  const [, name = null, value = ''] = DIRECTIVE.exec(raw) ?? [];
  if (name !== null)
    return { kind: 'directive', line, name: name.toLowerCase(), text: withoutComment(value) };
  if (raw.startsWith('%')) return { kind: 'comment', line };
  const [, letter = null, text = ''] = FIELD.exec(raw) ?? [];
  return letter === null
    ? { kind: 'other', line }
    : { kind: 'field', line, letter, text: withoutComment(text) };
}

/** `%` begins a comment unless a backslash stands before it. */
function withoutComment(text: string): string {
  const match = COMMENT.exec(text);
  return (match ? text.slice(0, match.index + match[0].length - 1) : text).trim();
}
