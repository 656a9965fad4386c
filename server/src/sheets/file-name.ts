/** Bytes of a name before its extension: file systems take 255 for all of it. */
const LONGEST = 180;

/**
 * A title as a file's name: without what Windows or a shell would stumble over, and not too long.
 * @param extension without the dot
 * @example fileName('Reels: who calls?', 'pdf') // 'Reels- who calls.pdf'
 */
export function fileName(title: string, extension: string): string {
  const plain = title
    .normalize('NFC')
    .replace(/["*/:<>?\\|]/g, '-')
    .replace(/\s+/g, ' ')
    .replace(/^[\s.-]+|[\s.-]+$/g, '');
  const kept: string[] = [];
  let bytes = 0;
  for (const letter of plain) {
    bytes += Buffer.byteLength(letter);
    if (bytes > LONGEST) break;
    kept.push(letter);
  }
  return `${kept.join('').trimEnd() || 'pegwell'}.${extension}`;
}
