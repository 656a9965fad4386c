import { readAbcKey } from './abc-key';

// ABC 2.1, section 4.6 "K: - key": the mode by its first three letters, capitals and spaces are ignored; no mode
// is major, `m` is minor; `K:none` and an empty `K:` are no key; `HP` and `Hp` are the pipes; `exp`, accidentals
// and clefs follow.
describe('readAbcKey', () => {
  it.each([
    ['A', 'A', 'major'],
    ['Am', 'A', 'minor'],
    ['A minor', 'A', 'minor'],
    ['AMin', 'A', 'minor'],
    ['F# MIXOLYDIAN', 'F#', 'mixolydian'],
    ['F#Mix', 'F#', 'mixolydian'],
    ['F#MIX', 'F#', 'mixolydian'],
    ['Bb', 'Bb', 'major'],
    ['Bbmix', 'Bb', 'mixolydian'],
    ['Bmin', 'B', 'minor'],
    ['B♭ dorian', 'Bb', 'dorian'],
    ['Ador', 'A', 'dorian'],
    ['A Aeolian', 'A', 'aeolian'],
    ['E phr', 'E', 'phrygian'],
    ['Flyd', 'F', 'lydian'],
    ['B locrian', 'B', 'locrian'],
    ['C ionian', 'C', 'major'],
    ['Gmajor', 'G', 'major'],
    // Not in the standard: Pegwell's own mode, and a capital M as in chords.
    ['A modal', 'A', 'modal'],
    ['GM', 'G', 'major'],
  ])('reads K:%s', (text, tonic, mode) => {
    expect(readAbcKey(text)).toEqual({ tonic, mode });
  });

  it.each([
    ['D =c', 'D', 'major'],
    ['Dmix^f', 'D', 'mixolydian'],
    ['D Phr ^f', 'D', 'phrygian'],
    ['Am clef=bass', 'A', 'minor'],
    ['G treble-8', 'G', 'major'],
    ['G bass', 'G', 'major'],
    ['D alto transpose=-2', 'D', 'major'],
    ['G middle=d', 'G', 'major'],
  ])('passes over what stands behind the key in K:%s', (text, tonic, mode) => {
    expect(readAbcKey(text)).toEqual({ tonic, mode });
  });

  it('leaves the mode of explicit accidentals unsaid', () => {
    expect(readAbcKey('D exp _b _e ^f')).toEqual({ tonic: 'D', mode: null });
  });

  it.each(['', 'none', 'HP', 'Hp', 'clef=alto', 'treble', '^c', 'H'])('finds no tonic in K:%s', (text) => {
    expect(readAbcKey(text)).toEqual({ tonic: null, mode: null });
  });
});
