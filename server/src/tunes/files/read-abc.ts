import { decodeText } from './abc-text';
import { readAbcKey } from './abc-key';
import { findHeaders, type AbcDirective, type AbcHeader } from './abc-headers';
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

/** Fields that a file header may give to all tunes (2.1 sections 2.2.2 and 3), as far as they are read here. */
const DEFAULTED = new Set(['C', 'S', 'R', 'N', 'G']);
/** Text strings: repeated ones are more of the same, by semicolons (3, "Repeated information fields"). */
const WORDS: Readonly<Record<string, WordField>> = { R: 'rhythm', C: 'composer', S: 'source' };

/**
 * The tunes of an ABC file, by the header rules of ABC 2.1 (C. Walshaw, 2011); music and free text are passed over.
 * @param limit at most so many tunes are read, and one more
 */
export function readAbc(text: string, limit: number): TuneFile {
  const { defaults, headers } = findHeaders(readAbcLines(text), limit);
  const tunes = headers.map((header) => understandTune(readTune(header, defaults)));
  // A file of nothing but comments is an exported empty library.
  const isEmpty = () => every(readAbcLines(text), ({ kind }) => kind !== 'field' && kind !== 'other');
  const problems =
    headers.length === 0 && !isEmpty()
      ? [{ line: 1, message: 'No tune was found: a tune begins with a line X:1.' }]
      : [];
  return { tunes, problems };
}

function every(lines: Iterable<AbcLine>, holds: (line: AbcLine) => boolean): boolean {
  for (const line of lines) if (!holds(line)) return false;
  return true;
}

function readTune(header: AbcHeader, defaults: AbcHeader): RawTune {
  const textsOf = (letter: string): Written[] => {
    const places = [header.fields, header.late, DEFAULTED.has(letter) ? defaults.fields : []];
    // An empty title is none; an empty note is an empty line.
    const said = places.map((fields) =>
      fields.filter((f) => f.letter === letter && (f.text !== '' || letter === 'N')),
    );
    const fields = said.find((found) => found.length > 0) ?? [];
    return fields.map(({ text, line }) => ({ text: decodeText(text), line }));
  };
  const words: Partial<Record<WordField, Written>> = {};
  const [title, ...others] = textsOf('T');
  if (title) words.title = title;
  for (const [letter, field] of Object.entries(WORDS)) {
    const found = textsOf(letter).filter(({ text }) => text.trim() !== '');
    if (found[0]) words[field] = { line: found[0].line, text: found.map(({ text }) => text).join('; ') };
  }
  // An instruction, unlike the others: the last one counts. Behind the key it names the part that begins.
  const parts = header.fields.filter(({ letter }) => letter === 'P').at(-1);
  if (parts) words.parts = { text: decodeText(parts.text), line: parts.line };
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
  { key, line }: AbcHeader,
  modeWord: AbcDirective | undefined,
): KeyReading & Pick<RawTune, 'keyLine' | 'problems'> {
  const keyLine = key?.line ?? line;
  const { tonic, mode } = key ? readAbcKey(key.text) : { tonic: null, mode: null };
  if (key && /^hp\b/i.test(key.text)) {
    const message = `K:${key.text.slice(0, 2)} is the pipes' scale and names no key. Write K:Amix, or what it is.`;
    return { tonic, mode, keyLine, problems: [{ line: keyLine, message }] };
  }
  if (!modeWord) return { tonic, mode, keyLine, problems: [] };
  const named = modeNamed(modeWord.text);
  if (named) return { tonic, mode: named, keyLine, problems: [] };
  const message = `"${modeWord.text.slice(0, 40)}" is no mode.`;
  return { tonic, mode, keyLine, problems: [{ line: modeWord.line, message }] };
}

/** The tune's own tunings; for kinds that it does not name, those of the file header. The last word counts. */
function readCells(own: readonly AbcDirective[], defaults: AbcHeader): RawTune['cells'] {
  const given = defaults.directives.filter(({ name }) => name === 'pegwell-tuning');
  const cells = [...given, ...own].map(({ text, line }) => {
    const [kind = ''] = text.split(/\s/, 1);
    return { kind, text: text.slice(kind.length).trim(), line };
  });
  return [...new Map(cells.map((cell) => [kindNamed(cell.kind)?.id ?? cell.kind, cell])).values()];
}
