import fc from 'fast-check';

/** What a field may be given by somebody who means harm, or whose program is broken. */
const NASTY: readonly unknown[] = [
  ...[null, true, 0, -1, 1.5, 1e308, -1e-308, 2 ** 53, -(2 ** 63)],
  ...['', ' ', '\u0000', 'a\u0000b', '\ud800', '\uffff', '\u202eright to left', '\u200b', '🎻'.repeat(50)],
  ...['x'.repeat(10_000), '%00', '%', '../../etc/passwd', '\r\nSet-Cookie: a=b', '${7*7}', '{{7*7}}'],
  ...["'; drop table tunes; --", '1 or 1=1', '" or ""="', '\\', '%_%', '<script>alert(1)</script>', '=1+1'],
  ...['NaN', 'Infinity', '-0', '1e400', '0x10', 'undefined', 'null', 'true', '1999-99-99T99:99'],
  ...['__proto__', 'constructor', 'prototype', 'toString', 'hasOwnProperty'],
  ...['00000000-0000-0000-0000-000000000000', 'not-an-id'],
  ...[[], {}, [[]], [null], Array(2_000).fill(0), { constructor: { prototype: { role: 'host' } } }],
];

/** Bodies that are no JSON, or hardly. */
export const RAW_BODIES: readonly string[] = [
  ...[
    '',
    ' ',
    '{',
    '}',
    'null',
    'true',
    '0',
    '"text"',
    '[]',
    '[[[[[[[[[[',
    '{"a":',
    '{"a":1,}',
    '\ufeff{}',
    '\u0000',
  ],
  ...[
    '{"__proto__":{"role":"host"}}',
    '{"a":{"__proto__":1}}',
    '{"a":1,"a":2}',
    'NaN',
    '[1e999999]',
    "{'a':1}",
  ],
  '['.repeat(50_000),
  `${'{"a":'.repeat(5_000)}1${'}'.repeat(5_000)}`,
];

export const nasty = fc.constantFrom(...NASTY);

/** The value with one thing wrong: a field taken away, added, or replaced by something nasty, wherever it stands. */
export function broken(values: fc.Arbitrary<unknown>): fc.Arbitrary<unknown> {
  return fc
    .tuple(values, fc.array(fc.nat(), { minLength: 1, maxLength: 6 }), nasty, fc.nat(3))
    .map(([value, path, replacement, how]) => breakAt(value, path, replacement, how));
}

function breakAt(value: unknown, path: readonly number[], replacement: unknown, how: number): unknown {
  const [step = 0, ...rest] = path;
  if (typeof value !== 'object' || value === null || path.length === 0) return replacement;
  const keys = Object.keys(value);
  if (Array.isArray(value)) {
    if (value.length === 0) return [replacement];
    const at = step % value.length;
    return value.map((each: unknown, index) => (index === at ? breakAt(each, rest, replacement, how) : each));
  }
  if (keys.length === 0 || (how === 0 && rest.length === 0)) return { ...value, surprise: replacement };
  const key = keys[step % keys.length] ?? '';
  const entries = Object.entries(value as Readonly<Record<string, unknown>>);
  if (how === 1 && rest.length === 0) return Object.fromEntries(entries.filter(([name]) => name !== key));
  return Object.fromEntries(
    entries.map(([name, each]) => [name, name === key ? breakAt(each, rest, replacement, how) : each]),
  );
}
