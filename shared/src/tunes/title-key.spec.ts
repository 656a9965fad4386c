import { describe, expect, it } from 'vitest';
import { titleKey } from './title-key';

// What counts and what does not is the contract's: case, accents, apostrophes and extra white space do not,
// articles do. Titles are traditional or invented.
describe('titleKey', () => {
  it.each([
    ["Soldier's Joy", 'SOLDIER’S  JOY'],
    ["Soldier's Joy", 'Soldiers Joy'],
    ['Mná na hÉireann', 'Mna na hEireann'],
    ['Mna\u0301', 'Mn\u00e1'],
    ["Fisher's Hornpipe", 'Fisher´s\u00a0Hornpipe'],
    ['Bjørn Ødegårds vals', 'bjorn odegards vals'],
    ['Großer Tanz', 'GROSSER TANZ'],
    ['İstanbul', 'istanbul'],
    ['Łódka', 'lodka'],
    ['Tab\tand line\nbreak', 'tab and line break'],
  ])('takes %j and %j for one title', (one, other) => {
    expect(titleKey(one)).toBe(titleKey(other));
  });

  it.each([
    ['The Road Home', 'Road Home'],
    ['Cluck Old Hen', 'Cluck, Old Hen'],
    ['Half-Past Four', 'Half Past Four'],
    ['Bonaparte No. 1', 'Bonaparte No. 2'],
  ])('tells %j from %j', (one, other) => {
    expect(titleKey(one)).not.toBe(titleKey(other));
  });

  it('holds nothing that a database refuses or a line cannot show', () => {
    expect(titleKey('a\u0000b\u200bc')).toBe('a bc');
  });

  it('changes nothing when taken twice', () => {
    for (const title of ['ﬁddle’s Ære', 'ΟΔΟΣ', '™ x', '´']) {
      expect(titleKey(titleKey(title))).toBe(titleKey(title));
    }
  });
});
