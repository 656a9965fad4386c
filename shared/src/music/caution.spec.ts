import { describe, expect, it } from 'vitest';
import { cautions, DEFERENCE, gentlerChoice, gradeOfRaise, worstGrade } from './caution';
import { builtInKind } from './instrument';
import type { Tuned } from './tuning';
import { parseTuning } from './tuning';

const fiddle = builtInKind('fiddle')!;
const banjo = builtInKind('banjo')!;

function tuned(kindId: string, text: string): Tuned {
  const parsed = parseTuning(builtInKind(kindId)!, text);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
}

const found = (kindId: string, from: string, to: string, gut = false): string =>
  cautions(builtInKind(kindId)!, tuned(kindId, from).pitches, tuned(kindId, to).pitches, { gut })
    .map(({ courseIndex, grade, twoGoes }) => `${courseIndex} ${grade}${twoGoes ? ', two goes' : ''}`)
    .join('; ');

describe('the grade of a raise above standard', () => {
  // score.md, "Words of safety, wherever pegs are turned".
  it.each([
    // above, plain top string, others, gut top, gut others
    [-3, 'none', 'none', 'none', 'none'],
    [0, 'none', 'none', 'none', 'none'],
    [1, 'caution', 'none', 'refused', 'note'],
    [2, 'caution', 'note', 'refused', 'caution'],
    [3, 'refused', 'caution', 'refused', 'refused'],
    [4, 'refused', 'caution', 'refused', 'refused'],
    [5, 'refused', 'refused', 'refused', 'refused'],
  ] as const)(
    '%i: %s on a top string, %s on others, %s and %s in gut',
    (above, top, other, gutTop, gutOther) => {
      expect(gradeOfRaise(above, true)).toBe(top);
      expect(gradeOfRaise(above, false)).toBe(other);
      expect(gradeOfRaise(above, true, { gut: true })).toBe(gutTop);
      expect(gradeOfRaise(above, false, { gut: true })).toBe(gutOther);
    },
  );
});

describe('the cautions of a retune', () => {
  it.each([
    ['fiddle', 'GDAE', 'AEAE', '0 note; 1 note'],
    ['fiddle', 'GDAE', 'DDAD', '0 none, two goes'],
    ['fiddle', 'DDAD', 'GDAE', '0 none, two goes'],
    ['fiddle', 'GDAE', 'EDAE', ''],
    ['fiddle', 'GDAE', 'EbDAE', '0 none, two goes'],
    ['fiddle', 'DDAD', 'AEAE', '0 note, two goes; 1 note'],
    ['fiddle', 'GDAE', 'AEAC#', '0 note; 1 note'],
    ['fiddle', 'AEAC#', 'GDAE', ''],
    ['fiddle', 'AEAE', 'AEAE', ''],
    ['fiddle', 'GDAE', 'GDAF', '3 caution'],
    ['fiddle', 'GDAE', 'G3 D4 A4 G5', '3 refused'],
    ['fiddle', 'GDAE', 'C4 D4 A4 E5', '0 refused, two goes'],
    ['fiddle', 'GDAE', 'Bb3 F4 A4 E5', '0 caution; 1 caution'],
    ['banjo', 'gDGBD', 'aDF#AD', '0 caution'],
    ['banjo', 'gDGBD', 'gDGCD', ''],
    ['banjo', 'f#DF#AD', 'gDGBD', ''],
    ['banjo', 'gDGBD', 'A4 D3 A3 D4 E4', '0 caution; 2 note; 3 caution; 4 caution'],
    // Coming down is never a raise, also where the string stays above standard.
    ['banjo', 'A4 D3 G3 B3 D4', 'G#4 D3 G3 B3 D4', ''],
    ['mandolin', 'GDAE', 'AEAE', '0 note; 1 note'],
    ['guitar', 'EADGBE', 'EADGBF', '5 caution'],
  ])('%s from %s to %s: %s', (kindId, from, to, expected) => {
    expect(found(kindId, from, to)).toBe(expected);
  });

  it('are one grade stricter in gut', () => {
    expect(found('fiddle', 'GDAE', 'AEAE', true)).toBe('0 caution; 1 caution');
    expect(found('fiddle', 'GDAE', 'GDAF', true)).toBe('3 refused');
    expect(found('fiddle', 'GDAE', 'GDGD', true)).toBe('');
  });

  it('count from standard where a player’s strings are not known', () => {
    expect(cautions(fiddle, null, tuned('fiddle', 'AEAE').pitches)).toHaveLength(2);
  });

  it('say how far, on which peg, and who decides', () => {
    const [low] = cautions(fiddle, tuned('fiddle', 'DDAD').pitches, tuned('fiddle', 'AEAE').pitches);
    expect(low).toEqual({
      courseIndex: 0,
      grade: 'note',
      aboveStandard: 2,
      twoGoes: true,
      sentence:
        'G peg (4th): a whole step above its standard pitch. Bring it up slowly, from below. Go there in two goes, with a rest between.',
    });
    const [fifth] = cautions(banjo, null, tuned('banjo', 'aDF#AD').pitches);
    expect(fifth?.sentence).toMatch(
      /^g peg \(5th\): a whole step above its standard pitch\. The string can break/,
    );
    const [top] = cautions(fiddle, null, ['G3', 'D4', 'A4', 'G5']);
    expect(top?.sentence).toMatch(/Only the player at the peg can go on\.$/);
    expect(DEFERENCE).toMatch(/string maker.*luthier/);
  });
});

describe('a gentler tuning', () => {
  const aeae = tuned('fiddle', 'AEAE');
  const gdae = tuned('fiddle', 'GDAE');
  const adae = tuned('fiddle', 'ADAE');

  it('is the first accepted one of a lower grade', () => {
    expect(gentlerChoice(fiddle, gdae.pitches, aeae, [aeae, adae, gdae])).toBe(gdae);
    const open = tuned('banjo', 'gDGBD');
    const high = tuned('banjo', 'aDF#AD');
    expect(gentlerChoice(banjo, null, high, [high, open])).toBe(open);
  });

  it('is none where nothing raises less or nothing is to warn of', () => {
    expect(gentlerChoice(fiddle, gdae.pitches, aeae, [aeae, adae])).toBeNull();
    expect(gentlerChoice(fiddle, gdae.pitches, gdae, [gdae, aeae])).toBeNull();
    expect(gentlerChoice(fiddle, gdae.pitches, aeae, 'any')).toBeNull();
  });

  it('goes by the gravest string', () => {
    expect(worstGrade([])).toBe('none');
    expect(worstGrade(cautions(banjo, null, ['A4', 'D3', 'A3', 'D4', 'E4']))).toBe('caution');
  });
});
