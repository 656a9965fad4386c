import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { InstrumentKind } from './instrument';
import { BUILT_IN_KINDS, builtInKind } from './instrument';
import { NAMED_TUNINGS } from './named-tunings';
import { midiOf } from './pitch';
import type { Tuned } from './tuning';
import { parseAccepted, parseTuning, sameTuned, sameTuning, showTuned, showTuning } from './tuning';

const fiddle = builtInKind('fiddle')!;
const banjo = builtInKind('banjo')!;
const dulcimer = builtInKind('dulcimer')!;
const mandolin = builtInKind('mandolin')!;

function reading(kind: InstrumentKind, text: string, capo?: number): string {
  const tuned = parseTuning(kind, text, capo);
  return tuned.ok ? `${tuned.value.pitches.join(' ')} / ${tuned.value.capo}` : tuned.reason;
}

describe('a short name', () => {
  // score.md, "Reading a short name".
  it.each([
    [fiddle, 'GDAE', 'G3 D4 A4 E5'],
    [fiddle, 'AEAE', 'A3 E4 A4 E5'],
    [fiddle, 'AEAC#', 'A3 E4 A4 C#5'],
    [fiddle, 'DDAD', 'D3 D4 A4 D5'],
    [fiddle, 'FCGD', 'F3 C4 G4 D5'],
    [fiddle, 'EDAE', 'E3 D4 A4 E5'],
    [fiddle, 'a-e-a-c♯', 'A3 E4 A4 C#5'],
    [fiddle, ' g D a E ', 'G3 D4 A4 E5'],
    [fiddle, 'AEADb', 'A3 E4 A4 Db5'],
    [banjo, 'gCGCD', 'G4 C3 G3 C4 D4'],
    [banjo, 'gdgbd', 'G4 D3 G3 B3 D4'],
    [banjo, 'GDGBD', 'G4 D3 G3 B3 D4'],
    [banjo, 'gDGB♭D', 'G4 D3 G3 Bb3 D4'],
    [dulcimer, 'DAd', 'D3 A3 D4'],
    [dulcimer, 'DAG', 'D3 A3 G4'],
    [mandolin, 'GDAD', 'G3 D4 A4 D5'],
  ])('of $0.id: $1 is $2', (kind, text, pitches) => {
    expect(reading(kind, text)).toBe(`${pitches} / 0`);
  });
});

describe('the tables of trade tunings', () => {
  // Fiddle: Wikipedia "Cross tuning"; waxandwane.org/oldtime.html; fiddletails.com (ADAD from memory).
  it.each([
    ['GDAE', 'G3 D4 A4 E5'],
    ['ADAE', 'A3 D4 A4 E5'],
    ['AEAE', 'A3 E4 A4 E5'],
    ['GDGD', 'G3 D4 G4 D5'],
    ['GDAD', 'G3 D4 A4 D5'],
    ['DDAD', 'D3 D4 A4 D5'],
    ['AEAC#', 'A3 E4 A4 C#5'],
    ['AEAD', 'A3 E4 A4 D5'],
    ['EDAE', 'E3 D4 A4 E5'],
    ['EEAE', 'E3 E4 A4 E5'],
    ['FCGD', 'F3 C4 G4 D5'],
    ['GDGB', 'G3 D4 G4 B4'],
    ['ADAD', 'A3 D4 A4 D5'],
  ])('fiddle %s is %s, both ways, and is named', (short, pitches) => {
    expect(reading(fiddle, short)).toBe(`${pitches} / 0`);
    expect(showTuning(fiddle, pitches.split(' '))).toBe(short);
    expect(NAMED_TUNINGS['fiddle']!.map((named) => named.pitches.join(' '))).toContain(pitches);
  });

  // Banjo: banjr.com/tunings.htm; Barnes & Mullins, "5-string banjo tunings" (gDGBbD from memory).
  it.each([
    ['gDGBD', 'G4 D3 G3 B3 D4'],
    ['gCGCD', 'G4 C3 G3 C4 D4'],
    ['gCGBD', 'G4 C3 G3 B3 D4'],
    ['gDGCD', 'G4 D3 G3 C4 D4'],
    ['f#DF#AD', 'F#4 D3 F#3 A3 D4'],
    ['aDF#AD', 'A4 D3 F#3 A3 D4'],
    ['gDGBbD', 'G4 D3 G3 Bb3 D4'],
  ])('banjo %s is %s, both ways, and is named', (short, pitches) => {
    expect(reading(banjo, short)).toBe(`${pitches} / 0`);
    expect(showTuning(banjo, pitches.split(' '))).toBe(short);
    expect(NAMED_TUNINGS['banjo']!.map((named) => named.pitches.join(' '))).toContain(pitches);
  });

  // facts.md, "Other instruments".
  it.each([
    ['guitar', 'EADGBE', 'E2 A2 D3 G3 B3 E4'],
    ['guitar', 'DADGBE', 'D2 A2 D3 G3 B3 E4'],
    ['guitar', 'DADGAD', 'D2 A2 D3 G3 A3 D4'],
    ['tenor-banjo', 'GDAE', 'G2 D3 A3 E4'],
    ['bouzouki', 'GDAD', 'G2 D3 A3 D4'],
    ['mandolin', 'GDAE', 'G3 D4 A4 E5'],
    ['bass', 'EADG', 'E1 A1 D2 G2'],
    ['ukulele', 'GCEA', 'G4 C4 E4 A4'],
    ['dulcimer', 'DAD', 'D3 A3 D4'],
    ['dulcimer', 'DAA', 'D3 A3 A3'],
    ['dulcimer', 'DAC', 'D3 A3 C4'],
  ])('%s %s is %s, both ways, and is named', (id, short, pitches) => {
    const kind = builtInKind(id)!;
    expect(reading(kind, short)).toBe(`${pitches} / 0`);
    expect(showTuning(kind, pitches.split(' '))).toBe(short);
    expect(NAMED_TUNINGS[id]!.map((named) => named.pitches.join(' '))).toContain(pitches);
  });

  it('shows in full what its letters would not give back', () => {
    expect(showTuning(dulcimer, ['D3', 'A3', 'G3'])).toBe('D3 A3 G3');
    // Fifths from C on a tenor banjo: G3 is 5 above D3, but C3 5 above G2; D4 and A4 are 5 above: all short.
    expect(showTuning(builtInKind('tenor-banjo')!, ['C3', 'G3', 'D4', 'A4'])).toBe('CGDA');
    expect(showTuning(fiddle, ['G2', 'D4', 'A4', 'E5'])).toBe('G2 D4 A4 E5');
    expect(showTuning(fiddle, ['F##3', 'D4', 'A4', 'E5'])).toBe('F##3 D4 A4 E5');
  });

  it('reads every named tuning back from how it is shown', () => {
    for (const kind of BUILT_IN_KINDS) {
      for (const { pitches } of NAMED_TUNINGS[kind.id]!) {
        expect(reading(kind, showTuning(kind, pitches))).toBe(`${pitches.join(' ')} / 0`);
      }
    }
  });
});

describe('the full form', () => {
  it.each([
    ['A3 E4 A4 E5', 'A3 E4 A4 E5'],
    ['a3 e4 a4 c♯5', 'A3 E4 A4 C#5'],
    ['A3-E4-A4-E5', 'A3 E4 A4 E5'],
    ['G1 D4 A4 Bb7', 'G1 D4 A4 Bb7'],
    ['F##3 Cbb4 A4 E5', 'F##3 Cbb4 A4 E5'],
  ])('%j is read as it is spelled', (text, pitches) => {
    expect(reading(fiddle, text)).toBe(`${pitches} / 0`);
  });
});

describe('a refusal', () => {
  it.each([
    [fiddle, 'GDA', 'A fiddle has 4 strings; GDA names 3: G D A.'],
    [fiddle, 'GDAEB', 'A fiddle has 4 strings; GDAEB names 5: G D A E B.'],
    [fiddle, 'GDHE', 'A fiddle has 4 strings; in GDHE, after G D, "H" could not be read.'],
    [fiddle, 'A3 E4 A4', 'A fiddle has 4 strings; A3 E4 A4 names 3: A3 E4 A4.'],
    [fiddle, 'A3 E4 X4 E5', 'A fiddle has 4 strings; in A3 E4 X4 E5, after A3 E4, "X4" could not be read.'],
    [
      fiddle,
      'G D4 A E',
      'A fiddle has 4 strings; in G D4 A E, "G" could not be read. Give every string its octave, or none.',
    ],
    [
      fiddle,
      'A3 E4 A4 E10',
      'A fiddle has 4 strings; in A3 E4 A4 E10, after A3 E4 A4, "E10" could not be read.',
    ],
    [fiddle, 'A3 E4 A4 B9', 'A fiddle has 4 strings; "B9" lies outside the pitches that can be written.'],
    [fiddle, '', 'A fiddle has 4 strings; nothing is written.'],
    [fiddle, 'capo 2', 'A fiddle has 4 strings; nothing is written.'],
    [fiddle, '?', 'A fiddle has 4 strings; "?" could not be read.'],
    [fiddle, 'any', 'A tuning is needed here; any names none.'],
    [mandolin, 'GDA', 'A mandolin has 4 courses of strings; GDA names 3: G D A.'],
    [banjo, 'gDGB', 'A banjo has 5 strings; gDGB names 4: G D G B.'],
    [builtInKind('ukulele')!, 'GCE', 'A ukulele has 4 strings; GCE names 3: G C E.'],
    [fiddle, 'GDAE capo', 'A capo needs its fret: capo 2.'],
    [fiddle, 'GDAE capo x', 'A capo is a fret from 0 (none) to 12; "x" is not.'],
    [fiddle, 'GDAE capo 13', 'A capo is a fret from 0 (none) to 12; "13" is not.'],
    [fiddle, 'GDAE capo -1', 'A capo is a fret from 0 (none) to 12; "-1" is not.'],
  ])('of $0.id: $1', (kind, text, sentence) => {
    expect(reading(kind, text)).toBe(sentence);
  });

  it('quotes a long or broken text on one short line', () => {
    const sentence = reading(fiddle, `x\n${'y'.repeat(5000)}`);
    expect(sentence).toMatch(/^A fiddle has 4 strings; "x y+…" could not be read\.$/);
    expect(sentence.length).toBeLessThan(120);
  });
});

describe('a capo', () => {
  it.each([
    ['gDGBD capo 2', 'G4 D3 G3 B3 D4 / 2'],
    ['gDGBD  CAPO  2', 'G4 D3 G3 B3 D4 / 2'],
    ['gDGBD capo 0', 'G4 D3 G3 B3 D4 / 0'],
    ['G4 D3 G3 B3 D4 capo 12', 'G4 D3 G3 B3 D4 / 12'],
  ])('%j stands behind the tuning', (text, expected) => {
    expect(reading(banjo, text)).toBe(expected);
  });

  it('may stand beside the text, but not against it', () => {
    expect(reading(banjo, 'gDGBD', 2)).toBe('G4 D3 G3 B3 D4 / 2');
    expect(reading(banjo, 'gDGBD capo 2', 2)).toBe('G4 D3 G3 B3 D4 / 2');
    expect(reading(banjo, 'gDGBD capo 2', 4)).toBe(
      'The capo is said twice: 2 in gDGBD capo 2, and 4 beside it.',
    );
    expect(reading(banjo, 'gDGBD', 13)).toBe('A capo is a fret from 0 (none) to 12; "13" is not.');
    expect(reading(banjo, 'gDGBD', 1.5)).toBe('A capo is a fret from 0 (none) to 12; "1.5" is not.');
  });
});

describe('a banjo’s capo spelling', () => {
  // score.md, "A capo"; facts.md: "double D", "A modal" and "open A" are capo 2.
  it.each([
    ['aDADE', 'gCGCD capo 2'],
    ['aEADE', 'gDGCD capo 2'],
    ['aEAC#E', 'gDGBD capo 2'],
    ['aEADbE', 'gDGBD capo 2'],
    ['a e a c♯ e', 'gDGBD capo 2'],
    ['aDAC#E', 'gCGBD capo 2'],
    ['aEACE', 'gDGBbD capo 2'],
    ['g#EbG#CEb', 'gDGBD capo 1'],
  ])('%s is %s', (text, shown) => {
    const tuned = parseTuning(banjo, text);
    expect(tuned.ok && showTuned(banjo, tuned.value)).toBe(shown);
  });

  it('means pegs in full form, beside a stated capo, and on any other kind', () => {
    expect(reading(banjo, 'A4 D3 A3 D4 E4')).toBe('A4 D3 A3 D4 E4 / 0');
    expect(reading(banjo, 'aDADE capo 0')).toBe('A4 D3 A3 D4 E4 / 0');
    expect(reading(banjo, 'aDADE capo 2')).toBe('A4 D3 A3 D4 E4 / 2');
    expect(reading(banjo, 'aDADE', 3)).toBe('A4 D3 A3 D4 E4 / 3');
    expect(reading({ ...banjo, id: 'own-banjo' }, 'aDADE')).toBe('A4 D3 A3 D4 E4 / 0');
    expect(reading(builtInKind('guitar')!, 'F#BEAC#F#')).toBe('F#2 B2 E3 A3 C#4 F#4 / 0');
  });

  it('is a raise: a named tuning lowered alike means pegs', () => {
    expect(reading(banjo, 'fCFAC')).toBe('F4 C3 F3 A3 C4 / 0');
  });

  it('is not shown for pegs that stand so: those are shown in full', () => {
    expect(showTuning(banjo, ['A4', 'D3', 'A3', 'D4', 'E4'])).toBe('A4 D3 A3 D4 E4');
  });

  it('never fits two named tunings: no two are the same strings at another height', () => {
    const named = NAMED_TUNINGS['banjo']!;
    const shapes = named.map(({ pitches }) =>
      pitches.map((name) => midiOf(name) - midiOf(pitches[0]!)).join(' '),
    );
    expect(new Set(shapes).size).toBe(named.length);
  });
});

describe('accepted tunings', () => {
  const shown = (kind: InstrumentKind, cell: string): string => {
    const accepted = parseAccepted(kind, cell);
    if (!accepted.ok) return accepted.reason;
    return accepted.value === 'any'
      ? 'any'
      : accepted.value.map((tuned) => showTuned(kind, tuned)).join(' | ');
  };

  it.each([
    [fiddle, 'AEAE or GDAE', 'AEAE | GDAE'],
    [fiddle, 'A3 E4 A4 E5 OR  gdae', 'AEAE | GDAE'],
    [banjo, 'gDGBD capo 2', 'gDGBD capo 2'],
    [banjo, 'gCGCD capo 2 or gCGCD', 'gCGCD capo 2 | gCGCD'],
    [banjo, 'aDADE or gDGBD capo 2', 'gCGCD capo 2 | gDGBD capo 2'],
    [banjo, 'aDADE or gCGCD capo 2', 'gCGCD capo 2'],
    [fiddle, ' Any ', 'any'],
    [fiddle, 'AEAE or any', 'any stands alone: leave it out, or leave out the tunings.'],
    [fiddle, 'AEAE or GDA', 'A fiddle has 4 strings; GDA names 3: G D A.'],
    [fiddle, '', 'A fiddle has 4 strings; nothing is written.'],
  ])('of $0.id: $1', (kind, cell, expected) => {
    expect(shown(kind, cell)).toBe(expected);
  });
});

describe('sameness', () => {
  it('goes by sound', () => {
    expect(sameTuning(['A3', 'E4', 'A4', 'C#5'], ['A3', 'E4', 'A4', 'Db5'])).toBe(true);
    expect(sameTuning(['A3', 'E4', 'A4', 'C#5'], ['A3', 'E4', 'A4', 'D5'])).toBe(false);
    expect(sameTuning(['A3'], ['A3', 'E4'])).toBe(false);
  });

  it('of how an instrument stands includes the capo', () => {
    const pitches = ['G4', 'D3', 'G3', 'B3', 'D4'];
    expect(sameTuned({ pitches, capo: 2 }, { pitches, capo: 2 })).toBe(true);
    expect(sameTuned({ pitches, capo: 2 }, { pitches, capo: 0 })).toBe(false);
  });
});

describe('whatever is written', () => {
  const kinds = fc.constantFrom(...BUILT_IN_KINDS);
  const letters = fc.constantFrom(...'CDEFGAB');
  const pitch = fc
    .tuple(letters, fc.constantFrom('', '#', 'b'), fc.integer({ min: 1, max: 8 }))
    .map((parts) => parts.join(''));
  const tuned: fc.Arbitrary<readonly [InstrumentKind, Tuned]> = kinds.chain((kind) =>
    fc.tuple(
      fc.constant(kind),
      fc.record({
        pitches: fc.array(pitch, { minLength: kind.courses.length, maxLength: kind.courses.length }),
        capo: fc.integer({ min: 0, max: 12 }),
      }),
    ),
  );
  /** Each pitch near its course's standard: short names are likelier. */
  const near: fc.Arbitrary<readonly [InstrumentKind, Tuned]> = kinds.chain((kind) =>
    fc.tuple(
      fc.constant(kind),
      fc.record({
        pitches: fc.tuple(
          ...kind.courses.map(({ standard }) =>
            fc
              .tuple(letters, fc.constantFrom('', '#', 'b'), fc.constant(standard.slice(-1)))
              .map((p) => p.join('')),
          ),
        ),
        capo: fc.integer({ min: 0, max: 12 }),
      }),
    ),
  );

  it('is read back as spelled from how it is shown, capo and all', () => {
    fc.assert(
      fc.property(fc.oneof(tuned, near), ([kind, value]) => {
        expect(parseTuning(kind, showTuned(kind, value))).toEqual({ ok: true, value });
        expect(parseTuning(kind, showTuning(kind, value.pitches), value.capo)).toEqual({ ok: true, value });
      }),
      { numRuns: 2000 },
    );
  });

  it('is accepted in full form', () => {
    fc.assert(
      fc.property(tuned, ([kind, { pitches }]) => {
        expect(parseTuning(kind, pitches.join(' '))).toEqual({ ok: true, value: { pitches, capo: 0 } });
      }),
    );
  });

  it('gives a value of the kind’s number of strings or a sentence, and never throws', () => {
    const near = fc.array(fc.constantFrom(...'abcdefgABCDEFG#♯♭b -0123459', ' capo ', ' or ', 'any'), {
      maxLength: 30,
    });
    fc.assert(
      fc.property(
        kinds,
        fc.oneof(
          fc.string({ unit: 'binary' }),
          near.map((signs) => signs.join('')),
        ),
        (kind, text) => {
          const parsed = parseTuning(kind, text);
          if (parsed.ok) {
            expect(parsed.value.pitches).toHaveLength(kind.courses.length);
            expect(parseTuning(kind, showTuned(kind, parsed.value))).toEqual(parsed);
          } else expect(parsed.reason).toMatch(/^[A-Z].*\.$/u);
          const accepted = parseAccepted(kind, text);
          if (!accepted.ok) expect(accepted.reason).toMatch(/\.$/u);
        },
      ),
      { numRuns: 2000 },
    );
  });
});
