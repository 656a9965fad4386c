/** Octets of a content line without its end (RFC 5545, section 3.1). */
const LONGEST_LINE = 75;

/** A property of a calendar; `text` values are escaped, others stand as they are. */
export interface Property {
  readonly name: string;
  readonly value: string;
}

/** A value of type TEXT (RFC 5545, section 3.3.11): backslash, comma, semicolon and line ends are escaped. */
export function text(name: string, value: string): Property {
  const escaped = value
    .replace(/\r\n?/g, '\n')
    // eslint-disable-next-line no-control-regex -- TSAFE-CHAR has no controls but the tab
    .replace(/[\u0000-\u0008\u000b-\u001f\u007f]/g, '')
    .replace(/[\\;,]/g, (sign) => `\\${sign}`)
    .replace(/\n/g, '\\n');
  return { name, value: escaped };
}

/** An instant in UTC (RFC 5545, section 3.3.5, form #2). */
export function instant(name: string, at: Date): Property {
  return {
    name,
    value: `${at
      .toISOString()
      .replace(/[-:]/g, '')
      .replace(/\.\d+Z$/, '')}Z`,
  };
}

/** Lines that end in CRLF and are folded so that no character is cut in two (RFC 5545, section 3.1). */
export function contentLines(properties: readonly Property[]): string {
  return properties.map(({ name, value }) => `${fold(`${name}:${value}`)}\r\n`).join('');
}

function fold(line: string): string {
  const parts: string[] = [];
  let part = '';
  let octets = 0;
  for (const character of line) {
    const size = Buffer.byteLength(character);
    if (octets + size > LONGEST_LINE) {
      parts.push(part);
      // The space that marks a continuation counts.
      [part, octets] = [' ', 1];
    }
    part += character;
    octets += size;
  }
  return [...parts, part].join('\r\n');
}
