import { describe, expect, it } from 'vitest';
import { changesOf, NEW_TUNE } from './tune-form-values';

describe('what is sent of an edited tune', () => {
  const before = {
    ...NEW_TUNE,
    title: 'Grey Owl',
    tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'GDAD', capo: 0 }] }],
  };

  it('is nothing when nothing changed, tunings included', () => {
    expect(changesOf(before, structuredClone(before))).toEqual({});
  });

  it('is the whole list of tunings when one of them changed', () => {
    const after = { ...before, tunings: [{ kind: 'fiddle', accepted: [{ tuning: 'GDAD', capo: 2 }] }] };
    expect(changesOf(before, after)).toEqual({ tunings: after.tunings });
  });

  it('is an empty text where a field was emptied', () => {
    expect(changesOf({ ...before, source: 'a book' }, before)).toEqual({ source: '' });
  });
});
