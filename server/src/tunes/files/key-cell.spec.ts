import { readKeyCells } from './key-cell';

describe('readKeyCells', () => {
  it.each([
    ['A', '', 'A', null],
    ['Am', '', 'A', 'minor'],
    ['A dorian', '', 'A', 'dorian'],
    ['A Dor', '', 'A', 'dorian'],
    ['amix', '', 'A', 'mixolydian'],
    ['F#m', '', 'F#', 'minor'],
    ['F♯ minor', '', 'F#', 'minor'],
    ['Bb', 'major', 'Bb', 'major'],
    ['bb', '', 'Bb', null],
    ['b', '', 'B', null],
    ['bm', '', 'B', 'minor'],
    ['B flat', 'Lydian', 'Bb', 'lydian'],
    ['F sharp minor', '', 'F#', 'minor'],
    ['G-modal', '', 'G', 'modal'],
    ['D maj.', '', 'D', 'major'],
    ['GM', '', 'G', 'major'],
    ['A minor', 'minor', 'A', 'minor'],
    ['', '', null, null],
    ['', 'dorian', null, 'dorian'],
    ['none', '', null, null],
    [' E ', ' PHRYGIAN ', 'E', 'phrygian'],
  ])('reads key %j and mode %j', (key, mode, tonic, named) => {
    expect(readKeyCells(key, mode)).toEqual({ ok: true, value: { tonic, mode: named } });
  });

  it.each([
    ['H', '', /^"H" is no key/],
    ['A minuet', '', /^"A minuet" is no key/],
    ['AB', '', /^"AB" is no key/],
    ['AEAE', '', /is no key/],
    ['A', 'sad', /^"sad" is no mode/],
    ['Am', 'dorian', /^The key says minor and the mode says dorian\.$/],
  ])('refuses key %j and mode %j with a sentence', (key, mode, sentence) => {
    expect(readKeyCells(key, mode)).toEqual({ ok: false, reason: expect.stringMatching(sentence) });
  });
});
