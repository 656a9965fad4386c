import type { Rack, RackPlan, Racks } from '@pegwell/shared/contract/racks';
import type { ShownTuning } from '@pegwell/shared/contract/tunes';
import { gentlerChoice } from '@pegwell/shared/music/caution';
import { builtInKind, type InstrumentKind } from '@pegwell/shared/music/instrument';
import { showTuned, showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import type { Arrival } from '@pegwell/shared/session/rack';
import { planRack, type RackPlan as EnginePlan, type RackTune } from '../ordering/engine/rack';
import { openingsOf, walkOf, type EveningEntry, type StoredEvening, type Walk } from '../sessions/evening';
import { shown } from '../sessions/present';
import type { RackRow } from './racks.repository';

/**
 * An evening as it stands on the board, with the tunings announced for it. Also while it is live: a plan that
 * players have in their heads does not change because a tune was called, only because the board changed.
 */
export class PlannedEvening {
  private readonly walk: Walk;
  private readonly openings: Readonly<Record<string, Tuned | null>>;

  constructor(private readonly stored: StoredEvening) {
    this.walk = walkOf({ ...stored, session: { ...stored.session, status: 'planned' } });
    this.openings = openingsOf(stored.session);
  }

  shown(): Racks['evening'] {
    const { session, chairs, sets } = this.stored;
    return {
      title: session.title,
      status: session.status,
      kinds: chairs.map(({ kind }) => kind),
      openings: shown(this.openings),
      sets: sets.map(({ id, title, entries }) => ({
        id,
        title,
        tunes: entries.map((entry) => ({
          id: entry.id,
          title: entry.title,
          key: entry.key,
          mode: entry.mode,
        })),
      })),
    };
  }

  present({ id, version, player, kind: kindId, arrivals }: RackRow): Rack {
    const kind = builtInKind(kindId);
    // Read before it was stored, and no kind is ever taken away.
    if (!kind) throw new Error(`the rack ${id} is of no known kind`);
    const starts = arrivals.map((arrival) => this.startOf(kind, arrival));
    const planned = planRack({
      kind,
      starts: starts.map((tuned) => tuned && tuned.pitches),
      tunes: this.tunesOf(kind),
    });
    return {
      ...{ id, version, player, kind: kindId },
      instruments: arrivals.map((arrival, index) => {
        const start = starts[index];
        return { arrives: arrivesAs(arrival), tuning: start ? showTuned(kind, start) : null };
      }),
      plan: planned.ok ? this.presentPlan(kind, planned.value) : null,
      refusal: planned.ok ? null : planned.reason,
    };
  }

  /** Null: free. So is an opening of "tune to the first tune". */
  private startOf(kind: InstrumentKind, arrival: Arrival): Tuned | null {
    if (arrival === 'free') return null;
    return arrival === 'opening' ? (this.openings[kind.id] ?? null) : arrival;
  }

  private tunesOf(kind: InstrumentKind): RackTune[] {
    const moves = this.walk.moves(kind.id);
    const offClock = new Map(this.walk.room.places.map((place) => [place.before, place.offClock]));
    return this.stored.entries.map((entry) => ({
      id: entry.id,
      offClock: offClock.get(entry.id) ?? false,
      announced: playsAsItStands(kind, entry) ? null : (moves.get(entry.id)?.to ?? null),
    }));
  }

  private presentPlan(kind: InstrumentKind, { bring, tunes, turns, cost, alone }: EnginePlan): RackPlan {
    const entries = new Map(this.stored.entries.map((entry) => [entry.id, entry]));
    const asItStands = (entryId: string) => {
      const entry = entries.get(entryId);
      return !entry || playsAsItStands(kind, entry);
    };
    return {
      bring: bring.map((pitches) => pitches && present(kind, { pitches, capo: 0 })),
      tunes: tunes.map(({ id, instrument, tuned }) => ({
        entryId: id,
        instrument,
        tuned: tuned && present(kind, tuned),
        asItStands: asItStands(id),
      })),
      turns: turns.map((turn) => {
        const { before, needed, offClock, instrument, from, to, deltas, pegChanges } = turn;
        const accepted = entries.get(needed)?.accepted[kind.id] ?? 'any';
        const gentler = gentlerChoice(kind, from.pitches, to, accepted);
        return {
          ...{ before, needed, offClock, instrument, deltas: [...deltas], pegChanges },
          from: present(kind, from),
          to: present(kind, to),
          gentler: gentler && showTuned(kind, gentler),
        };
      }),
      cost,
      alone,
    };
  }
}

function playsAsItStands(kind: InstrumentKind, { accepted }: EveningEntry): boolean {
  const list = accepted[kind.id] ?? 'any';
  return list === 'any' || list.length === 0;
}

const arrivesAs = (arrival: Arrival) => (typeof arrival === 'string' ? arrival : 'tuned');

function present(kind: InstrumentKind, { pitches, capo }: Tuned): ShownTuning {
  return { tuning: showTuning(kind, pitches), pitches: [...pitches], capo };
}
