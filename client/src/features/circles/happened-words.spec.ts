import { eventKinds, type Happened } from '@pegwell/shared/contract/history';
import { describe, expect, it } from 'vitest';
import { happenedWords } from './happened-words';

const event = (what: Happened['what'], more: Partial<Happened> = {}): Happened => ({
  ...{ id: 'x', at: '2027-01-14T19:30:00.000Z', what, who: 'Ada Weir', subjectId: null, subject: null },
  ...{ changed: [], role: null, counts: null },
  ...more,
});

describe('what happened, in words', () => {
  it.each<[Happened['what'], Partial<Happened>, string]>([
    [
      'tune.changed',
      { subject: 'Slack Tide', changed: ['key', 'stated'] },
      'changed the tune Slack Tide: its key and its tunings',
    ],
    [
      'session.changed',
      { subject: 'Thursday', changed: ['startsAt', 'localStart'] },
      'changed the evening Thursday: when it starts',
    ],
    ['member.added', { subject: 'Rosa Lind', role: 'cohost' }, 'added Rosa Lind as cohost'],
    ['member.removed', { subject: null }, 'took somebody whose account is gone out of the circle'],
    ['tunes.imported', { counts: { created: 1, updated: 3 } }, 'imported a file: 1 new tune, 3 changed'],
    ['session.code-changed', { subject: 'Thursday' }, 'gave the evening Thursday another code'],
  ])('%s', (what, more, did) => {
    expect(happenedWords(event(what, more)).did).toBe(did);
  });

  it('has words for everything that is written down', () => {
    for (const what of eventKinds) expect(happenedWords(event(what)).did).toMatch(/^[a-z].*[a-z\d]$/);
  });

  it('says it where the account of whoever did it is gone', () => {
    expect(happenedWords(event('member.left', { who: null })).who).toBe('somebody whose account is gone');
  });
});
