import iconv from 'iconv-lite';
import { read, refused, type Parsed } from '@pegwell/shared/music/parsed';

/** A file's text, and the encoding that it was read in, by its IANA name. */
export interface Decoded {
  readonly text: string;
  readonly encoding: string;
}

/** Files of other programs that people choose by mistake, by their first bytes (the formats' own documents). */
const SIGNATURES: readonly (readonly [hex: string, reason: string])[] = [
  ['504b0304', 'This is a ZIP archive or a spreadsheet’s own file. Unpack it, or save the table as CSV.'],
  ['d0cf11e0a1b11ae1', 'This is a spreadsheet’s or a text program’s own file. Save it as CSV.'],
  ['1f8b', 'This is a packed file (gzip). Unpack it first.'],
  ['25504446', 'This is a PDF. Tunes are read from CSV and ABC files.'],
];
const NOT_TEXT = 'This file is not text.';
/** ABC 2.1, section 3.1.17: a file may name its own character set; HTML's long names of them pass too. */
const CHARSET = /^(?:I:|%%)\s*abc-charset\s+([\w-]{1,30})/m;
/** Control characters without tab, line ends, form feed and the end mark of DOS files. */
// eslint-disable-next-line no-control-regex -- they are what is looked for
const CONTROLS = /[\u0000-\u0008\u000b\u000e-\u0019\u001b-\u001f\u007f]/g;
/** A stray one spoils its own tune, and no file; random bytes have one in nine. */
const MOST_CONTROLS = 1 / 100;

/**
 * The text of an uploaded file, or the sentence that says why it has none. A byte order mark has the first word;
 * then UTF-8, if every byte fits; then the character set that an ABC file names, as far as its bytes fit; then
 * Windows-1252, which is Latin-1 and more. No guess is made from the letters: it is wrong where it would be
 * needed, see the commit.
 */
export function decode(bytes: Buffer): Parsed<Decoded> {
  for (const [hex, reason] of SIGNATURES) {
    if (bytes.subarray(0, hex.length / 2).toString('hex') === hex) return refused(reason);
  }
  const encoding = markOf(bytes) ?? unmarkedUtf16(bytes) ?? (isUtf8(bytes) ? 'utf-8' : singleByte(bytes));
  // Takes a byte order mark off.
  const text = withoutEndMark(iconv.decode(bytes, encoding));
  if (text.trim() === '') return refused('This file is empty.');
  return isBinary(text) ? refused(NOT_TEXT) : read({ text, encoding });
}

/** Old DOS programs end a text with Ctrl-Z. */
function withoutEndMark(text: string): string {
  const trimmed = text.trimEnd();
  return trimmed.endsWith('\u001a') ? trimmed.slice(0, -1) : text;
}

function isBinary(text: string): boolean {
  const controls = text.match(CONTROLS)?.length ?? 0;
  return text.includes('\0') || controls > text.length * MOST_CONTROLS;
}

function markOf(bytes: Buffer): string | null {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return 'utf-16le';
  return bytes[0] === 0xfe && bytes[1] === 0xff ? 'utf-16be' : null;
}

/** Letters of Western titles have a zero in every second byte; text in one byte a letter has none. */
function unmarkedUtf16(bytes: Buffer): string | null {
  if (bytes.length % 2 === 1 || !bytes.includes(0)) return null;
  let even = 0;
  let odd = 0;
  for (let at = 0; at < bytes.length; at += 2) {
    if (bytes[at] === 0) even++;
    if (bytes[at + 1] === 0) odd++;
  }
  const enough = bytes.length / 4;
  if (odd > enough && even === 0) return 'utf-16le';
  return even > enough && odd === 0 ? 'utf-16be' : null;
}

function isUtf8(bytes: Buffer): boolean {
  try {
    new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return true;
  } catch {
    return false;
  }
}

/** A stated character set counts where it has one byte a letter; a stated UTF-8 was found untrue before. */
function singleByte(bytes: Buffer): string {
  const stated = CHARSET.exec(bytes.toString('latin1'))?.[1]?.toLowerCase();
  const known = stated !== undefined && /^(iso-8859-\d+|windows-125\d|koi8-[ru])$/.test(stated);
  // Latin-1 leaves 32 places empty in which Windows-1252 has quotes and dashes; so browsers read it too.
  return known && stated !== 'iso-8859-1' && iconv.encodingExists(stated) ? stated : 'windows-1252';
}
