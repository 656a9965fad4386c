import type { SessionSummary } from '@pegwell/shared/contract/sessions';
import { describe, expect, it } from 'vitest';
import { inTime } from './evening-times';

const now = Date.parse('2027-01-14T23:00:00Z');
const evening = (title: string, startsAt: string, status: SessionSummary['status'] = 'planned') =>
  ({ title, startsAt, status }) as SessionSummary;
const titles = (list: readonly SessionSummary[]) => list.map(({ title }) => title);

describe('evenings in time', () => {
  it('puts the next first, the last past one first, and what is live before all', () => {
    const { coming, past } = inTime(
      [
        evening('in May', '2027-05-01T19:00:00Z'),
        evening('next week', '2027-01-21T19:30:00Z'),
        evening('old and live', '2027-01-01T19:30:00Z', 'live'),
        evening('last week', '2027-01-07T19:30:00Z', 'finished'),
        evening('last year', '2026-01-07T19:30:00Z', 'finished'),
      ],
      now,
    );
    expect(titles(coming)).toEqual(['old and live', 'next week', 'in May']);
    expect(titles(past)).toEqual(['last week', 'last year']);
  });

  it('keeps an evening of tonight among the coming ones until it is finished or the night is over', () => {
    const tonight = evening('tonight', '2027-01-14T19:30:00Z');
    expect(titles(inTime([tonight], now).coming)).toEqual(['tonight']);
    expect(titles(inTime([{ ...tonight, status: 'finished' }], now).past)).toEqual(['tonight']);
    const nextNoon = Date.parse('2027-01-15T12:00:00Z');
    expect(titles(inTime([tonight], nextNoon).past)).toEqual(['tonight']);
  });
});
