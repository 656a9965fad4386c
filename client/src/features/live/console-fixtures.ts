import type { LiveState } from '@pegwell/shared/contract/live';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';

/** An evening as its members read it, for tests: worked example 1 of score.md in two sets. */
const entry = (number: number, title: string): ShownEntry => ({
  id: `e${number}`,
  tuneId: `t${number}`,
  settingId: null,
  pinned: false,
  open: null,
  sitOut: [],
  title,
  key: 'A',
  mode: 'major',
  rhythm: 'reel',
  minutes: 5,
  tunings: [],
  removed: false,
});

const none = {
  pegChanges: 0,
  retuneStops: 0,
  ruleBreaks: 0,
  secondChoices: 0,
  capoMoves: 0,
  keyChanges: 0,
  semitones: 0,
  offClockPegChanges: 0,
};

export function session(parts: Partial<Session> = {}): Session {
  return {
    id: 's1',
    circleId: 'c1',
    title: 'Thursday at the Old Mill',
    place: null,
    notes: null,
    code: 'QGQE34ES',
    version: 2,
    status: 'live',
    startsAt: '2027-01-14T18:30:00.000Z',
    localStart: '2027-01-14T19:30',
    timeZone: 'Europe/Berlin',
    chairs: [{ kind: 'fiddle', count: 5 }],
    openings: { fiddle: 'GDAE' },
    goal: 'pegs',
    spacedRhythms: ['waltz', 'air'],
    referenceA: 440,
    sets: [
      { id: 'x1', title: 'First set', entries: [entry(1, 'Ford Lane Reel'), entry(2, 'Slack Tide')] },
      { id: 'x2', title: 'Second set', entries: [entry(3, 'Lantern Hill')] },
    ],
    medleys: [],
    befores: [],
    score: none,
    called: ['e1'],
    nowEntryId: 'e1',
    inForce: { fiddle: 'GDAE' },
    updatedBy: null,
    can: ['sessions.read', 'sessions.change', 'live.run'],
    ...parts,
  };
}

export function liveState(parts: Partial<LiveState> = {}): LiveState {
  return {
    sessionId: 's1',
    liveVersion: 1,
    status: 'live',
    nowEntryId: 'e1',
    phase: 'playing',
    startedAt: '2027-01-14T18:31:00.000Z',
    stepAt: '2027-01-14T18:31:00.000Z',
    finishedAt: null,
    called: ['e1'],
    followUrl: 'https://tunes.example.org/f/QGQE34ES',
    ...parts,
  };
}
