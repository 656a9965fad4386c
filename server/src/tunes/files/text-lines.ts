const LINE_END = /\r\n|\n|\r/g;

/** Lines from 1, whatever they end in; one at a time, so that a file of nothing but line ends takes no room. */
export function* textLines(text: string): Generator<readonly [line: number, text: string]> {
  let from = 0;
  let line = 1;
  for (const { index, 0: end } of text.matchAll(LINE_END)) {
    yield [line++, text.slice(from, index)];
    from = index + end.length;
  }
  yield [line, text.slice(from)];
}
