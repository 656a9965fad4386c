import { setImmediate } from 'node:timers/promises';
import { Inject, Injectable } from '@nestjs/common';
import type { PlacePrice, PricedTunePage, PriceQuery, TunePrices } from '@pegwell/shared/contract/prices';
import { parseTonic } from '@pegwell/shared/music/pitch';
import type { EveningTune, Goal } from '@pegwell/shared/session/evening';
import { Insertions, type Price } from '@pegwell/shared/session/insert';
import { levelsOf } from '@pegwell/shared/session/levels';
import type { Member } from '../common/access';
import { notFound } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { acceptedTonight } from '../sessions/accepted';
import { scoredEvening, type StoredEvening } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { TunesService, type FoundTunes } from '../tunes/tunes.service';

/** Tunes that are weighed before phones get their turn: a few milliseconds. */
const AT_A_STRETCH = 50;

/** What one more tune of the circle costs on an evening, before it is taken. */
@Injectable()
export class PricesService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly evenings: EveningsService,
    private readonly tunes: TunesService,
  ) {}

  async library(member: Member, sessionId: string, query: PriceQuery): Promise<PricedTunePage> {
    const stored = await this.load(sessionId);
    const found = await this.tunes.find(member, query);
    const { insertions, present } = weighed(stored);
    const weigh = (tune: EveningTune) => insertions[query.place](tune);
    const { goal } = stored.session;
    const { page, pageSize } = query;
    const from = (page - 1) * pageSize;

    let priced: { tune: FoundTunes['tunes'][number]; price: Price | null }[] = [];
    const wanted = query.sort === 'title' ? found.tunes.slice(from, from + pageSize) : found.tunes;
    for (const [index, tune] of wanted.entries()) {
      if (index % AT_A_STRETCH === AT_A_STRETCH - 1) await setImmediate();
      priced.push({ tune, price: weigh(toTune(tune, found)) });
    }
    if (query.sort === 'price') {
      // A stable sort: what costs the same stays by title.
      priced.sort((a, b) => comparePrices(a.price, b.price, goal));
      priced = priced.slice(from, from + pageSize);
    }
    return {
      ...{ version: stored.session.version, goal, page, pageSize, total: found.tunes.length },
      items: priced.map(({ tune, price }) => ({ tune: found.present(tune), price: price && present(price) })),
    };
  }

  async everywhere(member: Member, sessionId: string, tuneId: string): Promise<TunePrices> {
    const stored = await this.load(sessionId);
    const found = await this.tunes.findOne(member, tuneId);
    const { insertions, present } = weighed(stored);
    const [tune] = found.tunes.map((each) => toTune(each, found));
    if (!tune) throw notFound();
    const [cheapest, next] = [insertions.cheapest(tune), insertions.next(tune)];
    return {
      version: stored.session.version,
      goal: stored.session.goal,
      tuneId,
      places: insertions.everywhere(tune).map(present),
      cheapest: cheapest && present(cheapest),
      next: next && present(next),
    };
  }

  private async load(sessionId: string): Promise<StoredEvening> {
    const stored = await this.evenings.load(this.db, sessionId);
    if (!stored) throw notFound();
    return stored;
  }
}

/** The evening weighed, and how a place of what is left of it is called on the whole board. */
function weighed(stored: StoredEvening): {
  readonly insertions: Insertions;
  readonly present: (price: Price) => PlacePrice;
} {
  const evening = scoredEvening(stored);
  const isLive = stored.session.status === 'live' && stored.session.progress !== null;
  const skipped = stored.sets.length - evening.sets.length;
  const called = (stored.sets[skipped]?.entries.length ?? 0) - (evening.sets[0]?.length ?? 0);
  return {
    insertions: new Insertions(evening, isLive ? 1 : 0),
    present: ({ setIndex, index, pegChanges, levels }) => {
      const at = skipped + setIndex;
      const before = stored.sets.slice(0, at).reduce((sum, { entries }) => sum + entries.length, 0);
      const place = setIndex === 0 ? called + index : index;
      return {
        setId: stored.sets[at]?.id ?? null,
        ...{ index: place, position: before + place, pegChanges, levels },
      };
    },
  };
}

/** A tune of the library as an evening would have it, under an id that no entry has. */
function toTune(tune: FoundTunes['tunes'][number], { usual }: FoundTunes): EveningTune {
  const { accepted } = acceptedTonight(tune.stated, tune, [], usual);
  const tonic = parseTonic(tune.key)?.pitchClass ?? 0;
  return { id: `one more ${tune.id}`, tonic, rhythm: tune.rhythm, accepted };
}

/** The cheapest first; at the end what could be weighed by pegs alone, and what has no place. */
function comparePrices(a: Price | null, b: Price | null, goal: Goal): number {
  if (!a || !b) return Number(a === null) - Number(b === null);
  if (!a.levels || !b.levels) {
    return Number(a.levels === null) - Number(b.levels === null) || a.pegChanges - b.pegChanges;
  }
  for (const level of levelsOf(goal)) {
    if (a.levels[level] !== b.levels[level]) return a.levels[level] - b.levels[level];
  }
  return 0;
}
