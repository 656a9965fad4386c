import type { PutBoard, Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseAccepted, showTuning } from '@pegwell/shared/music/tuning';
import { eveningOfBoard } from '@pegwell/shared/session/board-evening';
import { scoreEvening } from '@pegwell/shared/session/score';
import { ProblemError } from '../../../lib/problem';

/** What tests of the board stand on: entries, an evening, and a server that keeps versions as the real one does. */

export const uuid = (number: number) => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;

export function shownEntry(
  number: number,
  title: string,
  cells: Readonly<Record<string, string>> = { fiddle: 'GDAE' },
  more: Partial<ShownEntry> = {},
): ShownEntry {
  return {
    ...{
      id: uuid(number),
      tuneId: uuid(1000 + number),
      settingId: null,
      open: null,
      pinned: false,
      sitOut: [],
    },
    ...{ title, key: 'D', mode: 'major', rhythm: 'reel', minutes: 5, removed: false },
    tunings: Object.entries(cells).map(([kindId, cell]) => {
      const kind = builtInKind(kindId);
      const parsed = kind && parseAccepted(kind, cell);
      if (!kind || !parsed?.ok) throw new Error(`${cell} is no tuning of a ${kindId}`);
      const accepted =
        parsed.value === 'any'
          ? [{ tuning: 'any', pitches: null, capo: 0 }]
          : parsed.value.map(({ pitches, capo }) => ({
              tuning: showTuning(kind, pitches),
              pitches: [...pitches],
              capo,
            }));
      return { kind: kindId, accepted, assumed: false };
    }),
    ...more,
  };
}

export function sessionOf(sets: readonly (readonly ShownEntry[])[], more: Partial<Session> = {}): Session {
  const plain: Session = {
    ...{ id: uuid(900), circleId: uuid(901), title: 'Second Thursday', place: 'The boathouse', notes: null },
    ...{ code: 'HRNWEIR2', version: 1, status: 'planned', startsAt: '2027-01-14T18:30:00.000Z' },
    ...{ localStart: '2027-01-14T19:30', timeZone: 'Europe/Berlin', chairs: [{ kind: 'fiddle', count: 5 }] },
    ...{ openings: { fiddle: 'GDAE' }, goal: 'pegs', spacedRhythms: ['waltz', 'air'], referenceA: 440 },
    sets: sets.map((entries, index) => ({
      id: uuid(800 + index),
      title: `Set ${index + 1}`,
      entries: [...entries],
    })),
    ...{ medleys: [], befores: [], called: [], nowEntryId: null, inForce: null, updatedBy: 'Ida' },
    score: {
      pegChanges: 0,
      retuneStops: 0,
      ruleBreaks: 0,
      secondChoices: 0,
      capoMoves: 0,
      keyChanges: 0,
      semitones: 0,
      offClockPegChanges: 0,
    },
    can: ['sessions.read', 'sessions.change', 'tunes.read', 'live.run'],
    ...more,
  };
  return { ...plain, score: scoreEvening(eveningOfBoard(plain, plain)).score };
}

/** Keeps one board in versions: an old version is 409 with the state, the same board again is a success. */
export class BoardServer {
  /** Every board that was sent, in order. */
  readonly received: PutBoard[] = [];
  /** Set to make the next saves fail: before they are done, or after (the answer is lost). */
  failing: 'before' | 'after' | null = null;
  private readonly entries = new Map<string, ShownEntry>();

  constructor(public session: Session) {
    this.learn(session.sets.flatMap(({ entries }) => entries));
  }

  /** What entries look like; a real server reads its tables. */
  learn(entries: readonly ShownEntry[]): void {
    for (const entry of entries) this.entries.set(entry.id, entry);
  }

  put(body: PutBoard, who = 'Ida'): Promise<Session> {
    this.received.push(body);
    const offline = new ProblemError({ status: 0, code: 'offline', detail: 'Nobody there.' });
    if (this.failing === 'before') return Promise.reject(offline);
    const sets = body.sets.map(({ id = '', title, entries }) => ({
      id,
      title: title ?? 'A set',
      entries: entries.map((entry): ShownEntry => {
        const known = this.entries.get(entry.id ?? '');
        if (!known) throw new Error('an entry that the server was not told of');
        return { ...known, pinned: entry.pinned ?? false, sitOut: entry.sitOut ?? [] };
      }),
    }));
    const { medleys = this.session.medleys, befores = this.session.befores } = body;
    const stored = [this.session.sets, this.session.medleys, this.session.befores];
    const same = JSON.stringify([sets, medleys, befores]) === JSON.stringify(stored);
    if (!same && body.version !== this.session.version) {
      return Promise.reject(
        new ProblemError({
          status: 409,
          code: 'changed',
          detail: 'Changed.',
          body: { current: this.session },
        }),
      );
    }
    if (!same) {
      const version = this.session.version + 1;
      this.session = { ...this.session, sets, medleys, befores, version, updatedBy: who };
    }
    return this.failing === 'after' ? Promise.reject(offline) : Promise.resolve(this.session);
  }
}
