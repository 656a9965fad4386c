import { describe, expect, it } from 'vitest';
import {
  count,
  dayOf,
  halfMinutes,
  halves,
  lengthOf,
  listOf,
  momentOf,
  shortDayOf,
  timeOf,
  timeZones,
} from './format';

describe('lengths', () => {
  it.each([
    [0, '0 min'],
    [45, '45 min'],
    [60, '1 h'],
    [65, '1 h 05'],
    [112, '1 h 52'],
    [119.6, '2 h'],
  ])('%d minutes are %s', (minutes, words) => expect(lengthOf(minutes)).toBe(words));

  it.each([
    [0, '0'],
    [0.5, '½'],
    [3, '3'],
    [9.5, '9½'],
    [9.3, '9½'],
    [9.2, '9'],
  ])('%d is %s to the half', (minutes, words) => expect(halves(minutes)).toBe(words));

  it('names the unit', () => expect(halfMinutes(9.5)).toBe('9½ min'));
});

describe('words', () => {
  it('counts', () => {
    expect([count(1, 'peg'), count(0, 'peg'), count(2, 'bass', 'basses')]).toEqual([
      '1 peg',
      '0 pegs',
      '2 basses',
    ]);
  });

  it('lists', () => {
    expect([[], ['a'], ['a', 'b'], ['a', 'b', 'c']].map(listOf)).toEqual(['', 'a', 'a and b', 'a, b and c']);
  });
});

describe('dates', () => {
  // 14 January 2027 is a Thursday (ISO 8601 calendar); New York is UTC-5 in winter, London UTC.
  const evening = '2027-01-15T00:30:00Z';

  it('reads the clock of the circle, wherever the reader is', () => {
    expect(momentOf(evening, 'America/New_York', '2027-01-02')).toBe('Thursday 14 January, 19:30');
    expect(momentOf(evening, 'Europe/London', '2027-01-02')).toBe('Friday 15 January, 00:30');
  });

  it('adds the year where it is another one', () => {
    expect(dayOf(evening, 'America/New_York', '2026-12-01T12:00:00Z')).toBe('Thursday 14 January 2027');
  });

  it('has a short day and a time', () => {
    expect(shortDayOf(evening, 'America/New_York')).toBe('14 Jan 2027');
    expect(timeOf(evening, 'Asia/Kathmandu')).toBe('06:15');
  });

  it('knows the zones of the tz database', () => {
    expect(timeZones()).toEqual(expect.arrayContaining(['Europe/London', 'America/New_York', 'UTC']));
  });
});
