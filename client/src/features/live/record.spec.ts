import type { CirclePlay } from '@pegwell/shared/contract/live';
import { describe, expect, it } from 'vitest';
import { byEvening, playedFor, shortLength, stopOf, stopsOf } from './record';

const at = (minutes: number) => new Date(Date.parse('2027-01-14T19:00:00Z') + minutes * 60_000).toISOString();

/** A tune called, in tune and ended at these minutes. */
function play(
  title: string,
  [called, playing, ended]: readonly [number, number | null, number | null],
  more: Partial<CirclePlay> = {},
): CirclePlay {
  return {
    id: `${title} ${called}`,
    sessionId: 's1',
    entryId: title,
    tuneId: null,
    title,
    key: 'A',
    mode: 'major',
    tunings: { fiddle: 'AEAE' },
    calledAt: at(called),
    playingAt: playing === null ? null : at(playing),
    endedAt: ended === null ? null : at(ended),
    session: { title: 'Thursday', startsAt: at(0), timeZone: 'Europe/Berlin' },
    ...more,
  };
}

describe('the record', () => {
  it('puts plays in the order of playing, newest evening first', () => {
    const plays = [
      play('Late', [100, 100, null], { sessionId: 's2' }),
      play('Second', [6, 8, 12]),
      play('First', [0, 0, 6]),
    ];
    const evenings = byEvening(plays).map((evening) => [
      evening.sessionId,
      evening.plays.map(({ title }) => title),
    ]);
    expect(evenings).toEqual([
      ['s2', ['Late']],
      ['s1', ['First', 'Second']],
    ]);
  });

  it('says how long a stop took, and how long a tune was played', () => {
    expect([stopOf(play('One', [0, 0, 6])), playedFor(play('One', [0, 0, 6]))]).toEqual([null, 6 * 60_000]);
    expect([stopOf(play('Two', [6, 8, 12])), playedFor(play('Two', [6, 8, 12]))]).toEqual([120_000, 240_000]);
    expect([stopOf(play('Three', [12, null, 15])), playedFor(play('Three', [12, null, 15]))]).toEqual([
      null,
      null,
    ]);
  });

  it('counts stops whose end nobody said, and leaves them out of the average', () => {
    const plays = [
      play('A', [0, 0, 5]),
      play('B', [5, 7, 9]),
      play('C', [9, 12, 15]),
      play('D', [15, null, 20]),
    ];
    expect(stopsOf(plays)).toEqual({ count: 3, average: 150_000 });
    expect(stopsOf([play('A', [0, 0, 5])])).toEqual({ count: 0, average: null });
  });

  it.each([
    [39_600, '40 s'],
    [120_000, '2 min'],
    [151_000, '2½ min'],
    [299_000, '5 min'],
  ])('says %i ms as %s', (ms, words) => expect(shortLength(ms)).toBe(words));
});
