import { CODE_LENGTH, CODE_LETTERS, codeEnds, makeCode } from './session-code';

const at = (text: string) => new Date(`${text}Z`);
const ends = (finished: string | null, starts: string, given: string, step: string | null) =>
  new Date(
    codeEnds(
      { finishedAt: finished === null ? null : at(finished), startsAt: at(starts), codeGivenAt: at(given) },
      step === null ? null : at(step),
    ),
  );

describe('a code', () => {
  it('is 8 letters of 31 that are not mistaken for each other (contract.md)', () => {
    expect(new Set(CODE_LETTERS).size).toBe(31);
    expect(CODE_LETTERS).not.toMatch(/[01OIL]/);
    for (let made = 0; made < 1_000; made++) {
      expect(makeCode()).toMatch(new RegExp(`^[${CODE_LETTERS}]{${CODE_LENGTH}}$`));
    }
  });

  // contract.md: codes stop working 24 hours after the end.
  it.each([
    ['2027-01-14T23:00', '2027-01-14T19:30', '2027-01-01T00:00', '2027-01-14T23:00', '2027-01-15T23:00'],
    // Planned and never begun: 12 hours are the longest evening.
    [null, '2027-01-14T19:30', '2027-01-01T00:00', null, '2027-01-16T07:30'],
    // Begun, and nobody pressed "finish".
    [null, '2027-01-14T19:30', '2027-01-01T00:00', '2027-01-14T22:00', '2027-01-16T10:00'],
    // Written down in hindsight, or given a new code.
    [null, '2026-06-01T19:30', '2027-01-14T10:00', null, '2027-01-15T22:00'],
  ])('of an evening finished %s, planned for %s, ends', (finished, starts, given, step, until) => {
    expect(ends(finished, starts, given, step)).toEqual(at(until));
  });
});
