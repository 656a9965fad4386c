// A big messy ABC file, a spreadsheet and a list, with every oddity that imports are known to meet. Titles are
// traditional, which are common practice, or invented.

/** Windows-1252 (0x92 is ’, 0x96 –), lines ended the old way (CR): 23 headers, 4 of which no tune can be made of. */
export function messyAbc(): Buffer {
  const tunes = [
    ['X:1', 'T:Lantern Hill', 'R:breakdown', 'K:AMix', 'abc|'],
    // X: is missing, then repeated.
    ['T:Cold Kettle', 'K:Ador', 'abc|'],
    ['X:1', 'T:Slack Tide', 'K:D % odd', 'abc|'],
    ['X:4', 'K:G', 'T:Grey Owl', 'abc|'],
    ['X:5', 'T:Stone Weir', 'K:G', 'abc|', 'K:D', 'def|'],
    ['X:6', 'T:Ash Ford', 'T:The Road to Ash Ford', 'K:Gmaj clef=treble'],
    ['X:7', 'T:', 'T:Wren Gate', 'K:Dm^c'],
    ['Words between tunes, from a mail:', 'K: is missing below.'],
    ['X:8', "T:Se\\'an's Mn\\'a &amp; M\\'airt\\'in", 'K:Edor'],
    ['X:9', 'T:Café Réel \x96 l\x92été', 'K:C'],
    ['X:10', 'T:The 50% Reel', 'K:D'],
    ['X:11', 'T:Heron Weir (A part)', 'K:A'],
    // What a host has to look at: likely there already.
    ['X:12', 'T:Dusty Miller, The', 'C:trad', 'K:G'],
    // Tunings in words.
    ['X:13', 'T:June Apple', 'N:fiddle tuned AEAE', 'K:Amix'],
    ['X:14', 'T:Ruffled Drawers', 'G:fiddle:ADAE', 'K:D'],
    ['X:15', 'T:Cold Frosty Morning', 'N:played in cross-A, crooked', 'K:Am'],
    ['X:16', 'T:Sandy Boys (AEAE)', 'K:A'],
    // Part orders are no tunings.
    ['X:17', 'T:Old Mill', 'P:AABB', 'N:play it AABB', 'K:D'],
    ['  X:18', '  T:Indented', '  K:em', '  abc|'],
    ['X:19', '', 'T:Apart', '', 'K:F'],
    ['X:20', 'T:', 'K:A'],
    ['X:21', 'T:Pipes', 'K:Hp'],
    ['X:22', 'T:Drums', 'K:none'],
    ['X:23', 'T:No Key At All'],
  ];
  return Buffer.from(['%abc-2.1', '', ...tunes.flatMap((lines) => [...lines, ''])].join('\r'), 'latin1');
}

/** UTF-16 with semicolons: quoted line ends, short and long rows, a formula's quote; 5 tunes, 1 left out. */
export function messyTable(): Buffer {
  const rows = [
    'Tune;KEY;Comments;Fiddle;Type',
    'Barlow Knife;G;"slow,\r\nthen fast";GDGD or GDAE;reel',
    'Shady Grove;D dorian',
    "'=Sum of Parts;A;;;",
    'Lantern Hill;A mixolydian;;AEAE;',
    'Too Long;A;;;;;and more',
    ';;;;',
    'Gånglåt från Äppelbo;G;;;gånglåt',
  ];
  return Buffer.from(`\ufeff${rows.join('\r\n')}`, 'utf16le');
}

/** 5 tunes, 1 without a key. */
export const MESSY_LIST = [
  'Nothing of a Key',
  '1. Liza Jane (D)',
  '2) Needlecase - D',
  'A tunes (AEAE):',
  '* Greasy Coat',
  '',
  'Key of G',
  'Sally Ann',
].join('\n');
