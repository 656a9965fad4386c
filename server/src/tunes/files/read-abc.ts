import { decodeText } from './abc-text';
import { readAbcKey } from './abc-key';
import { readAbcLines, type AbcLine } from './abc-lines';
import {
  kindNamed,
  understandTune,
  type RawTune,
  type TuneFile,
  type WordField,
  type Written,
} from './file-tune';
import type { KeyReading } from './key-cell';
import { modeNamed } from './mode-word';

type Field = AbcLine & { readonly kind: 'field' };
type Directive = AbcLine & { readonly kind: 'directive' };

/** Fields of one kind in the order they stand in. */
interface Header {
  readonly line: number;
  readonly fields: Field[];
  readonly directives: Directive[];
  key: Field | null;
}

/** Fields that a file header may give to all tunes (2.1 sections 2.2.2 and 3), as far as they are read here. */
const DEFAULTED = new Set(['C', 'S', 'R', 'N', 'G']);
/** Text strings: repeated ones are more of the same, by semicolons (3, "Repeated information fields"). */
const WORDS: Readonly<Record<string, WordField>> = { R: 'rhythm', C: 'composer', S: 'source' };

/**
 * The tunes of an ABC file, by the header rules of ABC 2.1 (C. Walshaw, 2011): a tune begins at `X:` and ends at
 * an empty line, its header ends at `K:`; what stands before the first tune gives defaults; all else is free
 * text or music, and passed over. A paragraph that has `T:` and `K:` is taken for a tune that lost its `X:`.
 * @param limit at most so many tunes are read, and one more
 */
export function readAbc(text: string, limit: number): TuneFile {
  const lines = readAbcLines(text);
  const { defaults, headers } = readHeaders(lines, limit);
  const tunes = headers.map((header) => understandTune(readTune(header, defaults)));
  // A file of nothing but comments is an exported empty library.
  const isAnything = lines.some(({ kind }) => kind === 'field' || kind === 'other');
  const problems =
    headers.length === 0 && isAnything
      ? [{ line: 1, message: 'No tune was found: a tune begins with a line X:1.' }]
      : [];
  return { tunes, problems };
}

function readHeaders(lines: readonly AbcLine[], limit: number): { defaults: Header; headers: Header[] } {
  const headers: Header[] = [];
  let defaults: Header = emptyHeader(1);
  // The paragraph that is being read: a tune's from `X:` on, else perhaps the file header or free text.
  let open = emptyHeader(1);
  let isTune = false;
  let isText = false;
  const close = () => {
    const isNamed = open.fields.some(({ letter }) => letter === 'T') && open.key !== null;
    if (isTune || (isNamed && !isText)) headers.push(open);
    else if (headers.length === 0 && !isText && open.fields.length + open.directives.length > 0) {
      defaults = merged(defaults, open);
    }
    isTune = isText = false;
  };
  for (const line of lines) {
    const startsTune = line.kind === 'field' && line.letter === 'X';
    if (line.kind === 'empty' || startsTune) {
      close();
      if (headers.length > limit) break;
      open = emptyHeader(line.line + (startsTune ? 0 : 1));
      isTune = startsTune;
    } else if (line.kind === 'directive') open.directives.push(line);
    else if (open.key === null) {
      if (line.kind === 'other' && !isTune) isText = true;
      if (line.kind === 'field' && line.letter === 'K') open.key = line;
      else if (line.kind === 'field') open.fields.push(line);
    }
  }
  if (headers.length <= limit) close();
  return { defaults, headers };
}

function emptyHeader(line: number): Header {
  return { line, fields: [], directives: [], key: null };
}

function merged(one: Header, other: Header): Header {
  return {
    ...one,
    fields: [...one.fields, ...other.fields],
    directives: [...one.directives, ...other.directives],
  };
}

function readTune(header: Header, defaults: Header): RawTune {
  const textsOf = (letter: string): Written[] => {
    const own = header.fields.filter((field) => field.letter === letter);
    const fields =
      own.length === 0 && DEFAULTED.has(letter)
        ? defaults.fields.filter((field) => field.letter === letter)
        : own;
    return fields.map(({ text, line }) => ({ text: decodeText(text), line }));
  };
  const words: Partial<Record<WordField, Written>> = {};
  const [title, ...others] = textsOf('T').filter(({ text }) => text !== '');
  if (title) words.title = title;
  for (const [letter, field] of Object.entries(WORDS)) {
    const found = textsOf(letter).filter(({ text }) => text.trim() !== '');
    if (found[0]) words[field] = { line: found[0].line, text: found.map(({ text }) => text).join('; ') };
  }
  // An instruction, unlike the others: the last one counts.
  const parts = textsOf('P').at(-1);
  if (parts) words.parts = parts;
  // There is no place of their own yet for other titles and groups: the notes keep them.
  const notes = [
    ...textsOf('N'),
    ...others.map(({ text, line }) => ({ text: `Also: ${text}`, line })),
    ...textsOf('G').map(({ text, line }) => ({ text: `Group: ${text}`, line })),
  ];
  if (notes[0]) words.notes = { line: notes[0].line, text: notes.map(({ text }) => text).join('\n') };
  const directives = (name: string) => header.directives.filter((directive) => directive.name === name);
  return {
    line: header.line,
    id: directives('pegwell-id').at(-1)?.text ?? null,
    words,
    ...readKey(header, directives('pegwell-mode').at(-1)),
    cells: readCells(directives('pegwell-tuning'), defaults),
  };
}

function readKey(
  { key, line }: Header,
  modeWord: Directive | undefined,
): KeyReading & Pick<RawTune, 'keyLine' | 'problems'> {
  const keyLine = key?.line ?? line;
  const { tonic, mode } = key ? readAbcKey(key.text) : { tonic: null, mode: null };
  if (!modeWord) return { tonic, mode, keyLine, problems: [] };
  const named = modeNamed(modeWord.text);
  if (named) return { tonic, mode: named, keyLine, problems: [] };
  const message = `"${modeWord.text.slice(0, 40)}" is no mode.`;
  return { tonic, mode, keyLine, problems: [{ line: modeWord.line, message }] };
}

/** The tune's own tunings; for kinds that it does not name, those of the file header. The last word counts. */
function readCells(own: readonly Directive[], defaults: Header): RawTune['cells'] {
  const given = defaults.directives.filter(({ name }) => name === 'pegwell-tuning');
  const cells = [...given, ...own].map(({ text, line }) => {
    const [kind = ''] = text.split(/\s/, 1);
    return { kind, text: text.slice(kind.length).trim(), line };
  });
  return [...new Map(cells.map((cell) => [kindNamed(cell.kind)?.id ?? cell.kind, cell])).values()];
}
