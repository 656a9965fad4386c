import { matchesTag } from './etag';

describe('If-None-Match', () => {
  // RFC 9110, 13.1.2 and 8.8.3.2 (weak comparison).
  it.each([
    ['"a"', true],
    ['W/"a"', true],
    ['"b", "a"', true],
    ['"b",W/"a"', true],
    ['*', true],
    ['"b"', false],
    ['a', false],
    ['', false],
    [undefined, false],
  ])('%j names "a": %j', (header, names) => {
    expect(matchesTag(header, '"a"')).toBe(names);
  });
});
