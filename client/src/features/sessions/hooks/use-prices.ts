import type { Tune } from '@pegwell/shared/contract/tunes';
import { tuneOfEntry } from '@pegwell/shared/session/board-evening';
import { pricing, type Price } from '@pegwell/shared/session/board-price';
import type { EveningTune } from '@pegwell/shared/session/evening';
import { useEffect, useRef, useState } from 'react';
import { entryOfTune } from '../entries';
import type { ScoredBoard } from './use-scored';

/** Milliseconds of reckoning at a stretch: what is typed or dragged meanwhile is not held up. */
const SLICE = 6;

export function eveningTuneOf(tune: Tune): EveningTune {
  return tuneOfEntry(entryOfTune(tune, `new ${tune.id}`));
}

/** Tunes that ask the same of everybody cost the same. */
const keyOf = ({ accepted, rhythm, tonic }: EveningTune) => JSON.stringify([accepted, rhythm, tonic]);

/**
 * What each tune would cost at its cheapest place, reckoned in idle moments; a price that is not known yet
 * keeps the one it had on the board before.
 * @param fixed how many tunes at the head of the evening keep their place
 * @returns by tune id; a tune is absent until its price is known, and null where there is no place for it
 */
export function usePrices(
  scored: ScoredBoard,
  tunes: readonly Tune[],
  fixed: number,
): ReadonlyMap<string, Price | null> {
  const [prices, setPrices] = useState<ReadonlyMap<string, Price | null>>(new Map());
  const known = useRef<{ readonly of: ScoredBoard | null; readonly by: Map<string, Price | null> }>({
    ...{ of: null, by: new Map() },
  });

  useEffect(() => {
    if (known.current.of !== scored) known.current = { of: scored, by: new Map() };
    const { by } = known.current;
    const asked = tunes.map((tune) => ({ id: tune.id, tune: eveningTuneOf(tune) }));
    const rest = asked.filter(({ tune }) => !by.has(keyOf(tune)));
    let running: Generator<void, Price | null> | null = null;
    let timer: ReturnType<typeof setTimeout> | undefined;

    const publish = () =>
      setPrices((before) => {
        const now = new Map(before);
        for (const { id, tune } of asked) {
          const price = by.get(keyOf(tune));
          if (price !== undefined) now.set(id, price);
        }
        return now;
      });

    const slice = () => {
      const until = performance.now() + SLICE;
      while (performance.now() < until) {
        const next = rest[0];
        if (!next) return publish();
        if (by.has(keyOf(next.tune))) {
          rest.shift();
          continue;
        }
        running ??= pricing(scored.evening, scored.score, next.tune, fixed);
        const step = running.next();
        if (step.done) {
          by.set(keyOf(next.tune), step.value);
          rest.shift();
          running = null;
        }
      }
      publish();
      timer = setTimeout(slice);
    };
    timer = setTimeout(slice);
    return () => clearTimeout(timer);
  }, [scored, tunes, fixed]);

  return prices;
}
