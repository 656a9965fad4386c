import { read, refused, type Parsed } from '@pegwell/shared/music/parsed';

const UTF8 = 'Save it as UTF-8 and try again.';

/** The text of an uploaded file, or the sentence that says why it has none. A byte order mark is taken off. */
export function decodeUpload(bytes: Buffer): Parsed<string> {
  if ((bytes[0] === 0xff && bytes[1] === 0xfe) || (bytes[0] === 0xfe && bytes[1] === 0xff)) {
    return refused(`This file is UTF-16 text. ${UTF8}`);
  }
  if (bytes.includes(0)) return refused('This file is not text.');
  let text: string;
  try {
    text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return refused(`This file is not UTF-8 text: line ${firstBadLine(bytes)} cannot be read. ${UTF8}`);
  }
  return text.trim() === '' ? refused('This file is empty.') : read(text);
}

/** From 1. */
function firstBadLine(bytes: Buffer): number {
  const decoder = new TextDecoder('utf-8', { fatal: true });
  let line = 1;
  let from = 0;
  for (let end = bytes.indexOf(10); end !== -1; end = bytes.indexOf(10, from)) {
    try {
      decoder.decode(bytes.subarray(from, end));
    } catch {
      return line;
    }
    from = end + 1;
    line++;
  }
  return line;
}
