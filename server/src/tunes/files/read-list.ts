import { understandTune, type FileTune, type TuneFile, type Written } from './file-tune';
import { findTunings } from './found-tunings';
import { readKeyCells, type KeyReading } from './key-cell';
import { textLines } from './text-lines';

/** Characters of a line: no title is so long. */
const LONGEST = 1_000;
const BULLET = /^(?:\d{1,4}[.)]|[-*•–—·])\s+/;
/** `June Apple (A)`, with brackets of either kind. */
const BRACKET = /\s*[([]([^()[\]]{1,60})[)\]]/g;
/** `June Apple - A`, `June Apple, A`, `June Apple: A`, or a tab between. */
const BEHIND = /^(.*\S)\s*(?:\s[-–—|]\s|[,;:\t])\s*(\S.{0,30})$/s;
/** `A tunes:`, `Key of D`, `Tunes in G (GDGD)`: a heading gives the key of those below it. */
const HEADING =
  /^(?:(?:tunes|songs) in|(?:the )?key of)\s+(.{1,30}?):?$|^(.{1,30}?)\s+(?:tunes|songs):?$|^(\S{1,30}(?: \S{1,30})?):$/i;

/**
 * A list as people type it, a tune a line, its key in brackets or behind the title. A line that names nothing but a
 * key and says that it is a heading gives the key of the lines below that have none.
 * @example readList('June Apple (A)\nLiza Jane - D', 10) // two tunes
 * @param limit at most so many tunes are read, and one more
 */
export function readList(text: string, limit: number): TuneFile {
  const tunes: FileTune[] = [];
  let heading: { readonly key: KeyReading; readonly hint: Written } | null = null;
  for (const [line, raw] of textLines(text)) {
    const written = raw.slice(0, LONGEST).trim().replace(BULLET, '').trim();
    if (written === '') continue;
    const headed = headingOf(written);
    if (headed) {
      heading = { key: headed, hint: { text: written, line } };
      continue;
    }
    const { title, key, hints } = takeApart(written);
    const { tonic, mode } = key ?? heading?.key ?? { tonic: null, mode: null };
    tunes.push(
      understandTune({
        ...{ line, id: null, words: { title: { text: title, line } }, tonic, mode, keyLine: line },
        ...{ cells: [], problems: [] },
        hints: [...hints.map((hint) => ({ text: hint, line })), ...(heading && !key ? [heading.hint] : [])],
      }),
    );
    if (tunes.length > limit) break;
  }
  return { tunes, problems: [] };
}

function headingOf(written: string): KeyReading | null {
  const match = HEADING.exec(written.replace(BRACKET, '').trim());
  return match ? keyOf(match[1] ?? match[2] ?? match[3] ?? '') : null;
}

interface Line {
  readonly title: string;
  readonly key: KeyReading | null;
  readonly hints: readonly string[];
}

/** Brackets that hold a key, a tuning or both leave the title; others (`(A part)`) are part of it. */
function takeApart(written: string): Line {
  const hints: string[] = [];
  const named: KeyReading[] = [];
  const title = written.replace(BRACKET, (whole, inside: string) => {
    const pieces = keyOf(inside) ? [inside] : inside.split(/\s*[,;/]\s*|\s+(?=\S*$)/);
    const keys = pieces.map(keyOf);
    const understood = pieces.every((piece, at) => keys[at] !== null || findTunings(piece).length > 0);
    if (!understood) return whole;
    named.push(...keys.filter((read) => read !== null));
    hints.push(inside);
    return '';
  });
  const plain = title.trim();
  const [key = null] = named;
  const [, before = '', after = ''] = BEHIND.exec(plain) ?? [];
  const behind = key === null && before !== '' ? keyOf(after) : null;
  return behind ? { title: before, key: behind, hints } : { title: plain, key, hints };
}

function keyOf(text: string): KeyReading | null {
  const read = readKeyCells(text, '');
  return read.ok && read.value.tonic !== null ? read.value : null;
}
