import { describe, expect, it } from 'vitest';
import { builtInKind } from '../music/instrument';
import { parseTuning, type Tuned } from '../music/tuning';
import type { Tunings } from './progress';
import { takeStep, type LiveRoom, type Standing, type Step, type StepResult } from './step';

// The semantics are those of the contract, "The live evening".

const tuned = (text: string): Tuned => {
  const [kind, tuning] = text.startsWith('g') ? ['banjo', text] : ['fiddle', text];
  const parsed = parseTuning(builtInKind(kind)!, tuning);
  if (!parsed.ok) throw new Error(parsed.reason);
  return parsed.value;
};
const tunings = (fiddle: string | null, banjo = 'gDGBD'): Tunings => ({
  fiddle: fiddle === null ? null : tuned(fiddle),
  banjo: tuned(banjo),
});

/** Worked example 1 of score.md: what the fiddle has with each tune. */
const EVENING: Record<string, Tunings> = {
  one: tunings('GDAE'),
  two: tunings('AEAE'),
  three: tunings('GDAE'),
  four: tunings('ADAE'),
  five: tunings('AEAE'),
};

const room = (parts: Partial<LiveRoom> = {}): LiveRoom => ({
  order: Object.keys(EVENING),
  openings: tunings('GDAE'),
  kinds: ['fiddle'],
  tuningsFor: (id) => EVENING[id]!,
  ...parts,
});

const planned: Standing = { status: 'planned', phase: null, progress: null };

/** Takes steps one after the other; each must be taken. */
function walk(steps: readonly (Step['action'] | Step)[], inRoom = room()): Standing {
  return steps.reduce<Standing>((standing, step) => {
    const result = takeStep(inRoom, standing, typeof step === 'string' ? { action: step } : step);
    if (result.outcome === 'unchanged') return standing;
    if (result.outcome === 'refused') throw new Error(result.reason);
    return result.standing;
  }, planned);
}

const at = (standing: Standing) => [standing.progress?.nowEntryId, standing.phase];
const goTo = (entryId: string): Step => ({ action: 'goto', entryId });
const refusal = (result: StepResult) => (result.outcome === 'refused' ? result.reason : null);

describe('a step of the evening', () => {
  it('starts with the first entry, playing where nobody has to turn', () => {
    const standing = walk(['start']);
    expect(at(standing)).toEqual(['one', 'playing']);
    expect(standing).toMatchObject({ status: 'live', progress: { called: ['one'], previousEntryId: null } });
  });

  it('starts in tuning where the first tune wants another tuning than the opening', () => {
    const standing = walk(['start'], room({ openings: tunings('AEAE') }));
    expect(at(standing)).toEqual(['one', 'tuning']);
    expect(standing.progress?.before).toEqual(tunings('AEAE'));
  });

  it('walks the order, tuning from a step until everyone has retuned', () => {
    expect(at(walk(['start', 'next']))).toEqual(['two', 'tuning']);
    expect(at(walk(['start', 'next', 'retuned']))).toEqual(['two', 'playing']);
    expect(at(walk(['start', 'next', 'retuned', 'next', 'next']))).toEqual(['four', 'tuning']);
  });

  it('counts the room as retuned by a forward step from tuning', () => {
    const standing = walk(['start', 'next', 'next']);
    expect(standing.progress).toMatchObject({ before: EVENING['two'], inForce: EVENING['three'] });
  });

  it('keeps what was in force before the step once the room has retuned', () => {
    expect(walk(['start', 'next', 'retuned']).progress?.before).toEqual(EVENING['one']);
  });

  it('steps back from tuning to the earlier tune with nothing to turn', () => {
    const standing = walk(['start', 'next', 'back']);
    expect(at(standing)).toEqual(['one', 'playing']);
    expect(standing.progress).toEqual({
      nowEntryId: 'one',
      called: ['one', 'two'],
      previousEntryId: 'two',
      before: EVENING['one'],
      inForce: EVENING['one'],
    });
  });

  it('steps back from tuning to the tune before the step, not to the one before in order', () => {
    expect(at(walk(['start', goTo('four'), 'back']))).toEqual(['one', 'playing']);
  });

  it('steps back from playing to the entry before in order, from the tunings in force', () => {
    const standing = walk(['start', goTo('four'), 'retuned', 'back']);
    expect(at(standing)).toEqual(['three', 'tuning']);
    expect(standing.progress).toMatchObject({ before: EVENING['four'], inForce: EVENING['three'] });
  });

  it('keeps each called entry once, in the order of calling', () => {
    const standing = walk(['start', goTo('four'), 'retuned', 'back', 'next', 'next']);
    expect(standing.progress?.called).toEqual(['one', 'four', 'three', 'five']);
  });

  it('does not stop the room for kinds without chairs', () => {
    const guitars = room({ kinds: ['guitar'] });
    expect(at(walk(['start', 'next'], guitars))).toEqual(['two', 'playing']);
  });

  it('stops the room for a capo that moves', () => {
    const capo = room({
      kinds: ['fiddle', 'banjo'],
      tuningsFor: (id) => tunings('GDAE', id === 'two' ? 'gDGBD capo 2' : 'gDGBD'),
    });
    expect(at(walk(['start', 'next'], capo))).toEqual(['two', 'tuning']);
  });

  it('does not stop the room for the first tuning of a kind that was free', () => {
    const free = room({ openings: tunings(null), tuningsFor: () => tunings('AEAE') });
    expect(at(walk(['start'], free))).toEqual(['one', 'playing']);
  });

  it('takes the tunings as they sound: a respelled string turns nothing', () => {
    const respelled = room({ tuningsFor: (id) => tunings(id === 'one' ? 'AEAC#' : 'AEADb') });
    expect(at(walk(['start', 'retuned', 'next'], respelled))).toEqual(['two', 'playing']);
  });

  it('finishes, from tuning too, and keeps what was called', () => {
    for (const steps of [
      ['start', 'finish'],
      ['start', 'next', 'finish'],
    ] as const) {
      const standing = walk(steps);
      expect([standing.status, standing.phase]).toEqual(['finished', null]);
      expect(standing.progress?.called).toEqual(['one', 'two'].slice(0, steps.length - 1));
    }
  });

  it.each<[string, readonly (Step['action'] | Step)[], Step]>([
    ['start on a running evening', ['start', 'next'], { action: 'start' }],
    ['retuned while playing', ['start'], { action: 'retuned' }],
    ['goto where it is', ['start'], goTo('one')],
    ['finish on a finished evening', ['start', 'finish'], { action: 'finish' }],
  ])('leaves the evening as it stands: %s', (_, steps, step) => {
    expect(takeStep(room(), walk(steps), step)).toEqual({ outcome: 'unchanged' });
  });

  it.each<[string, readonly Step['action'][], Step, RegExp]>([
    ['next before the start', [], { action: 'next' }, /has not started/],
    ['retuned before the start', [], { action: 'retuned' }, /has not started/],
    ['goto before the start', [], goTo('two'), /has not started/],
    ['finish before the start', [], { action: 'finish' }, /has not started/],
    ['next after the last', ['start', 'next', 'next', 'next', 'next'], { action: 'next' }, /last tune/],
    ['back at the first', ['start'], { action: 'back' }, /first tune/],
    ['goto of an unknown entry', ['start'], goTo('nine'), /not on the evening/],
    ['start after the end', ['start', 'finish'], { action: 'start' }, /is finished/],
    ['next after the end', ['start', 'finish'], { action: 'next' }, /is finished/],
  ])('refuses nonsense with a sentence: %s', (_, steps, step, sentence) => {
    expect(refusal(takeStep(room(), walk(steps), step))).toMatch(sentence);
  });

  it('refuses back from tuning at the first, and a start without tunes', () => {
    const opening = room({ openings: tunings('AEAE') });
    expect(refusal(takeStep(opening, walk(['start'], opening), { action: 'back' }))).toMatch(/first tune/);
    expect(refusal(takeStep(room({ order: [] }), planned, { action: 'start' }))).toMatch(/no tune/);
  });
});
