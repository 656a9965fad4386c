import { readAbcKey } from './abc-key';

// ABC 2.1, section 3.1.14 "K: - key": the mode by its first three letters, capitals and spaces are ignored; no mode
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
    // Nor these, which people write.
    ['em', 'E', 'minor'],
    ['bb', 'Bb', 'major'],
    ['a dorian', 'A', 'dorian'],
    ['A harmonic minor', 'A', 'minor'],
    ['G major/E minor', 'G', 'major'],
  ])('reads K:%s', (text, tonic, mode) => {
    expect(readAbcKey(text)).toEqual({ tonic, mode });
  });

  // The table of section 3.1.14, sharps to flats: major, minor, mixolydian, dorian, phrygian, lydian, locrian.
  const TABLE = [
    'C# A#m G#Mix D#Dor E#Phr F#Lyd B#Loc',
    'F# D#m C#Mix G#Dor A#Phr BLyd E#Loc',
    'B G#m F#Mix C#Dor D#Phr ELyd A#Loc',
    'E C#m BMix F#Dor G#Phr ALyd D#Loc',
    'A F#m EMix BDor C#Phr DLyd G#Loc',
    'D Bm AMix EDor F#Phr GLyd C#Loc',
    'G Em DMix ADor BPhr CLyd F#Loc',
    'C Am GMix DDor EPhr FLyd BLoc',
    'F Dm CMix GDor APhr BbLyd ELoc',
    'Bb Gm FMix CDor DPhr EbLyd ALoc',
    'Eb Cm BbMix FDor GPhr AbLyd DLoc',
    'Ab Fm EbMix BbDor CPhr DbLyd GLoc',
    'Db Bbm AbMix EbDor FPhr GbLyd CLoc',
    'Gb Ebm DbMix AbDor BbPhr CbLyd FLoc',
    'Cb Abm GbMix DbDor EbPhr FbLyd BbLoc',
  ];
  const COLUMNS = ['major', 'minor', 'mixolydian', 'dorian', 'phrygian', 'lydian', 'locrian'];

  it('reads all 105 keys of the table', () => {
    const read = TABLE.flatMap((row) => row.split(' ').map((key) => readAbcKey(key)));
    const expected = TABLE.flatMap((row) =>
      row.split(' ').map((key, column) => ({ tonic: /^[A-G][#b]?/.exec(key)![0], mode: COLUMNS[column] })),
    );
    expect(read).toHaveLength(105);
    expect(read).toEqual(expected);
  });

  it.each([
    ['D =c', 'D', 'major'],
    ['Dm^c', 'D', 'minor'],
    ['Gmaj clef=treble', 'G', 'major'],
    ['Dmix^f', 'D', 'mixolydian'],
    ['D Phr ^f', 'D', 'phrygian'],
    ['Am clef=bass', 'A', 'minor'],
    ['G treble-8', 'G', 'major'],
    ['G bass', 'G', 'major'],
    ['D alto transpose=-2', 'D', 'major'],
    ['G middle=d', 'G', 'major'],
    ['Am transpose=-2', 'A', 'minor'],
  ])('passes over what stands behind the key in K:%s', (text, tonic, mode) => {
    expect(readAbcKey(text)).toEqual({ tonic, mode });
  });

  it('leaves the mode of explicit accidentals unsaid', () => {
    expect(readAbcKey('D exp _b _e ^f')).toEqual({ tonic: 'D', mode: null });
  });

  it.each([
    '',
    'none',
    'HP',
    'Hp',
    'clef=alto',
    'treble',
    'bass middle=d transpose=-24',
    'perc stafflines=1',
    '^c',
    'H',
    'alto',
    'clef=bass',
  ])('finds no tonic in K:%s', (text) => {
    expect(readAbcKey(text)).toEqual({ tonic: null, mode: null });
  });
});
