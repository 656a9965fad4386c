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

// `s`: line separators of Unicode are no line ends here. Indented headers are no part of the standard.
const FIELD = /^([A-Za-z]|\s+[A-Z]):(.*)$/s;
const DIRECTIVE = /^(?:%%|I:)\s*(\S+)\s*(.*)$/s;
const COMMENT = /(?<!\\)(?:\\\\)*%/;
const COMMENT_BEHIND_TITLE = /(?<![\\\d])(?:\\\\)*%/;

/**
 * Lines from 1, with `+:` joined by a space to the field, or the `I:` directive, that it continues; comments and
 * `%%` directives may stand between (section 3.3).
 */
export function readAbcLines(text: string): AbcLine[] {
  const lines: AbcLine[] = [];
  // Where in `lines` stands what a `+:` would continue.
  let open: number | null = null;
  text.split(/\r\n|\n|\r/).forEach((raw, index) => {
    const continued = raw.startsWith('+:') && open !== null ? lines[open] : undefined;
    if (open !== null && (continued?.kind === 'field' || continued?.kind === 'directive')) {
      const letter = continued.kind === 'field' ? continued.letter : null;
      lines[open] = {
        ...continued,
        text: `${continued.text} ${withoutComment(raw.slice(2), letter)}`.trim(),
      };
      return;
    }
    const line = readLine(raw, index + 1);
    if (line.kind === 'field' || raw.startsWith('I:')) open = lines.length;
    else if (line.kind === 'empty' || line.kind === 'other') open = null;
    lines.push(line);
  });
  return lines;
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
