import fc from 'fast-check';
import { AlikeIndex, mostErrors } from './alike-index';
import { looseTitle } from './loose-title';

function alike(one: string, ...others: string[]): string[] {
  const index = new AlikeIndex<string>();
  for (const other of others) index.add(other, other);
  return index.find(one);
}

// Titles are traditional or invented; how they are misspelled is common practice.
describe('AlikeIndex', () => {
  it.each([
    ['The Dusty Miller', 'Dusty Miller, The'],
    ['Dusty Miller', 'Dusty Miller (A part)'],
    ['Half-Past Four', 'Halfpast Four'],
    ['Elzic’s Farewell', "Elzick's Farewell"],
    ['Bonaparte Crossing the Rhine', 'Bonapart Crosing the Rhine'],
    ['Sally Ann', 'Sally Anne'],
    ['Rock & Rye', 'Rock and Rye'],
    ['La Bastringue', 'Bastringue'],
    ['June Apple (AEAE)', 'June Apple'],
    ['Mná na hÉireann', 'Mna na h-Eireann'],
  ])('takes %j and %j for likely one tune', (one, other) => {
    expect(alike(one, other)).toEqual([other]);
    expect(alike(other, one)).toEqual([one]);
  });

  it.each([
    ['Polska No. 2', 'Polska No. 3'],
    ['Reel in A', 'Reel in D'],
    ['Old Joe', 'Old Jim'],
    ['Sally Ann', 'Sally Goodin'],
    ['Ida Red', 'Old Red'],
    ['???', '!!!'],
    ['Breaking Up Christmas', 'Breaking Up Thanksgiving'],
  ])('tells %j from %j', (one, other) => {
    expect(alike(one, other)).toEqual([]);
  });

  it('shows the likest first, and no more than three', () => {
    const titles = ['Lantern Hall', 'Lantern Hill', 'Lantern Hills', 'Lantern Mills', 'Lantorn Hell'];
    expect(alike('Lantern Hill', ...titles)).toEqual(['Lantern Hill', 'Lantern Hall', 'Lantern Hills']);
  });

  it('finds what comparing all with all finds, by a recursion of its own', () => {
    const word = fc.string({ unit: fc.constantFrom('l', 'm', 'n', 'o'), minLength: 3, maxLength: 18 });
    fc.assert(
      fc.property(fc.uniqueArray(word, { maxLength: 12 }), word, (titles, title) => {
        const expected = titles.filter(
          (other) =>
            slowDistance(title, other) <= Math.min(mostErrors(title.length), mostErrors(other.length)),
        );
        for (const other of titles) {
          expect(alike(title, other)).toEqual(expected.includes(other) ? [other] : []);
        }
        expect(alike(title, ...titles)).toHaveLength(Math.min(3, expected.length));
      }),
      { numRuns: 500 },
    );
  });

  it('compares five thousand titles with ten thousand in a moment', () => {
    const index = new AlikeIndex<number>();
    const title = (n: number) => `${WORDS[n % 40]} ${WORDS[Math.floor(n / 40) % 40]} ${WORDS[(n * 7) % 40]}`;
    for (let n = 0; n < 10_000; n++) index.add(`${title(n)} reel`, n);
    const started = process.cpuUsage();
    for (let n = 0; n < 5_000; n++) index.find(`the ${title(n)} rele`);
    // Microseconds of work, on a slow machine.
    expect(process.cpuUsage(started).user).toBeLessThan(3_000_000);
  });
});

describe('looseTitle', () => {
  it('keeps a title that is nothing but a bracket or an article', () => {
    expect(looseTitle('(Untitled)').letters).toBe('untitled');
    expect(looseTitle('The').letters).toBe('the');
    expect(looseTitle('???').letters).toBe('');
  });
});

const WORDS = Array.from(
  { length: 40 },
  (_, n) => `${'bcdfghklmn'[n % 10]}${'aeio'[n % 4]}${'rstv'[n >> 3]}en`,
);

/** As Levenshtein defined it (1966), without any table. */
function slowDistance(one: string, other: string, most = 4): number {
  if (most < 0) return 1;
  if (one === '' || other === '') return one.length + other.length;
  if (one[0] === other[0]) return slowDistance(one.slice(1), other.slice(1), most);
  return (
    1 +
    Math.min(
      slowDistance(one.slice(1), other, most - 1),
      slowDistance(one, other.slice(1), most - 1),
      slowDistance(one.slice(1), other.slice(1), most - 1),
    )
  );
}
