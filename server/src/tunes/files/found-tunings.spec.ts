import { builtInKind } from '@pegwell/shared/music/instrument';
import { showCell } from './show-cell';
import { findTunings } from './found-tunings';

const found = (text: string) =>
  findTunings(text).map(({ kind, accepted }) => `${kind} ${showCell(builtInKind(kind)!, accepted)}`);

// What people write into notes, groups and titles: common practice, and from memory.
describe('findTunings', () => {
  it.each<[string, string[]]>([
    ['fiddle tuned AEAE', ['fiddle AEAE']],
    ['AEAE', ['fiddle AEAE']],
    ['Tuning: A-E-A-C#', ['fiddle AEAC#']],
    ['fiddle:ADAE', ['fiddle ADAE']],
    ['played cross-A', ['fiddle AEAE']],
    ['in cross G on the fiddle', ['fiddle GDGD']],
    ['fiddle AEAE or GDAE', ['fiddle AEAE or GDAE']],
    [
      'fiddle AEAE, banjo gDGBD capo 2; guitar DADGBE',
      ['fiddle AEAE', 'banjo gDGBD capo 2', 'guitar DADGBE'],
    ],
    ['aDADE', ['banjo gCGCD capo 2']],
    ['banjo in double C', ['banjo gCGCD']],
    ['banjo: sawmill', ['banjo gDGCD']],
    ['mandolin AEAE', ['mandolin AEAE']],
    ['dulcimer DAd', ['dulcimer DAD']],
    ['open A tuning', ['fiddle AEAC#']],
    ['fiddle tuned aeae', ['fiddle AEAE']],
    // No built-in name, but said to be one.
    ['fiddle tuned FCFC', ['fiddle FCFC']],
    ['fiddle with a high bass, ADAE', ['fiddle ADAE']],
  ])('finds in %j', (text, tunings) => {
    expect(found(text)).toEqual(tunings);
  });

  it.each([
    ...['AABB', 'fiddle plays AABB', 'parts ABAC', 'a crooked B part', 'the open A string rings', 'FACE'],
    ...['an old fiddle tune; goes fast', 'a Cajun fiddle tune', 'sawmill', 'high bass', 'banjo in G minor'],
    ...[
      'from a DEAF fiddler',
      'Added by me',
      'fiddle: face the room',
      'Bb major',
      'CABBAGE',
      'GDAEX',
      'XAEAE',
    ],
    ...['fiddle tuned QRST', '', 'tuned up a whole step', 'A (A part)', 'ABCDEFG'],
  ])('finds nothing in %j', (text) => {
    expect(found(text)).toEqual([]);
  });

  it('keeps the words that it was found in', () => {
    expect(findTunings('Learnt late. Fiddle tuned AEAE (slow)')).toMatchObject([
      { said: 'Fiddle tuned AEAE' },
    ]);
  });

  it('reads long notes of nothing but letters in a moment', () => {
    const started = process.cpuUsage();
    findTunings('AEAE-'.repeat(1_000));
    findTunings('A'.repeat(5_000));
    expect(process.cpuUsage(started).user).toBeLessThan(500_000);
  });
});
