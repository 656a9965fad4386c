import type { LiveAction, Phase } from '../contract/live';
import type { SessionStatus } from '../contract/sessions';
import { sameTuned } from '../music/tuning';
import type { Progress, Tunings } from './progress';

/** Where an evening stands, as the host's console sees it. */
export interface Standing {
  readonly status: SessionStatus;
  /** Null unless it is live. */
  readonly phase: Phase | null;
  /** Null before the start; kept after the end. */
  readonly progress: Progress | null;
}

/** What a step needs to know of the evening. */
export interface LiveRoom {
  /** The board's entries in playing order. */
  readonly order: readonly string[];
  /** What every kind arrives in. */
  readonly openings: Tunings;
  /** The kinds with chairs: what others would turn stops nobody. */
  readonly kinds: readonly string[];
  /** What every kind has in force with this entry, were it called now: the best choice for what is left. */
  readonly tuningsFor: (entryId: string) => Tunings;
}

export interface Step {
  readonly action: LiveAction;
  readonly entryId?: string | undefined;
}

/** What a step does. The names of the outcomes are what the record of the evening goes by. */
export type StepResult =
  /** Nonsense from here; `reason` is a sentence for the host. */
  | { readonly outcome: 'refused'; readonly reason: string; readonly unknownEntry?: true }
  /** It stands so already. */
  | { readonly outcome: 'unchanged' }
  | {
      readonly outcome:
        | 'called'
        /** Stepped back before anybody was in tune: the tune was not played, the one before goes on. */
        | 'withdrawn'
        | 'retuned'
        | 'finished';
      readonly standing: Standing & { readonly progress: Progress };
    };

/**
 * The one place that knows which step may follow which. A forward step from `tuning` counts the room as
 * retuned; `back` from `tuning` returns to the earlier tune, and nobody turns anything.
 */
export function takeStep(room: LiveRoom, standing: Standing, step: Step): StepResult {
  const { status, progress } = standing;
  if (status === 'finished') {
    if (step.action === 'finish') return { outcome: 'unchanged' };
    return refused('This evening is finished. It takes no more steps.');
  }
  if (status === 'planned' || progress === null) return start(room, step);
  switch (step.action) {
    case 'start':
      return { outcome: 'unchanged' };
    case 'next': {
      const next = room.order[room.order.indexOf(progress.nowEntryId) + 1];
      if (next === undefined) return refused('This is the last tune. Finish the evening, or go to another.');
      return call(room, progress, next);
    }
    case 'back':
      return standing.phase === 'tuning' ? withdraw(progress) : stepBack(room, progress);
    case 'goto':
      if (step.entryId === progress.nowEntryId) return { outcome: 'unchanged' };
      if (step.entryId === undefined || !room.order.includes(step.entryId)) {
        return { ...refused('This entry is not on the evening’s board.'), unknownEntry: true };
      }
      return call(room, progress, step.entryId);
    case 'retuned':
      if (standing.phase === 'playing') return { outcome: 'unchanged' };
      return { outcome: 'retuned', standing: { status: 'live', phase: 'playing', progress } };
    case 'finish':
      return { outcome: 'finished', standing: { status: 'finished', phase: null, progress } };
  }
}

function start({ order, openings, kinds, tuningsFor }: LiveRoom, { action }: Step): StepResult {
  if (action !== 'start') return refused('The evening has not started. Start it first.');
  const [first] = order;
  if (first === undefined)
    return refused('There is no tune on this evening’s board yet. Put one there first.');
  const inForce = tuningsFor(first);
  const progress = { nowEntryId: first, called: [first], previousEntryId: null, before: openings, inForce };
  return { outcome: 'called', standing: { status: 'live', phase: phaseOf(kinds, progress), progress } };
}

function call({ kinds, tuningsFor }: LiveRoom, from: Progress, entryId: string): StepResult {
  const progress: Progress = {
    nowEntryId: entryId,
    called: from.called.includes(entryId) ? from.called : [...from.called, entryId],
    previousEntryId: from.nowEntryId,
    before: from.inForce,
    inForce: tuningsFor(entryId),
  };
  return { outcome: 'called', standing: { status: 'live', phase: phaseOf(kinds, progress), progress } };
}

function stepBack(room: LiveRoom, progress: Progress): StepResult {
  const earlier = room.order[room.order.indexOf(progress.nowEntryId) - 1];
  if (earlier === undefined) return refused('This is the first tune: there is none before it.');
  return call(room, progress, earlier);
}

function withdraw(from: Progress): StepResult {
  if (from.previousEntryId === null) return refused('This is the first tune: there is none before it.');
  const progress: Progress = {
    nowEntryId: from.previousEntryId,
    // It was called, if not played: it keeps its place on the board.
    called: from.called,
    previousEntryId: from.nowEntryId,
    before: from.before,
    inForce: from.before,
  };
  return { outcome: 'withdrawn', standing: { status: 'live', phase: 'playing', progress } };
}

/** `tuning` while any kind with chairs has a peg or a capo to move into the tune that is now. */
function phaseOf(kinds: readonly string[], { before, inForce }: Progress): Phase {
  const moves = kinds.some((kind) => {
    const [from, to] = [before[kind], inForce[kind]];
    return from && to && !sameTuned(from, to);
  });
  return moves ? 'tuning' : 'playing';
}

function refused(reason: string): { readonly outcome: 'refused'; readonly reason: string } {
  return { outcome: 'refused', reason };
}
