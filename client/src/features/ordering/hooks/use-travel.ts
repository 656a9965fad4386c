import { useEffect, useRef, type RefObject } from 'react';
import { useMedia } from '../../../lib/use-media';

/** Milliseconds: the old places are seen first, then the way. */
const STANDS = 350;
const TRAVELS = 900;

/**
 * Lets the rows of a list travel to their places from where they stood in an order before, once they are in
 * sight; none with reduced motion. Rows carry their id in `data-entry` and stand in the document as they are
 * now, so that nobody is read an order that is only passing. What belongs between rows (`data-between`) is seen
 * when they have arrived.
 *
 * @param before the order to come from at first; later it is the one that was shown
 */
export function useTravel(
  list: RefObject<HTMLElement | null>,
  before: readonly string[],
  now: readonly string[],
): void {
  const calm = useMedia('(prefers-reduced-motion: reduce)');
  const shown = useRef(before);
  const order = now.join();

  useEffect(() => {
    const host = list.current;
    const from = shown.current;
    if (!host || calm || from.join() === order || typeof IntersectionObserver === 'undefined')
      return undefined;
    const travel = () => {
      const ids = order.split(',');
      shown.current = ids;
      const rows = new Map(
        [...host.querySelectorAll<HTMLElement>('[data-entry]')].map((row) => [
          row.dataset['entry'] ?? '',
          row,
        ]),
      );
      const places = new Map([...rows].map(([id, row]) => [id, row.getBoundingClientRect()]));
      for (const [id, row] of rows) {
        // A place is where the tune is that has it now: the sets are as long as they were.
        const old = places.get(ids[from.indexOf(id)] ?? '');
        const own = places.get(id);
        if (!old || !own || old === own) continue;
        const away = `translate(${old.left - own.left}px, ${old.top - own.top}px)`;
        row.animate([{ transform: away }, { transform: 'none' }], {
          ...{ duration: TRAVELS, delay: STANDS, fill: 'backwards' },
          easing: 'cubic-bezier(0.3, 0.6, 0.1, 1)',
        });
      }
      for (const between of host.querySelectorAll('[data-between]')) {
        between.animate([{ opacity: 0 }, { opacity: 1 }], {
          ...{ duration: TRAVELS / 3, delay: STANDS + TRAVELS, fill: 'backwards' },
        });
      }
    };
    const sight = new IntersectionObserver(
      (seen) => {
        if (!seen.some(({ isIntersecting }) => isIntersecting)) return;
        sight.disconnect();
        travel();
      },
      { rootMargin: '0px 0px -25% 0px' },
    );
    sight.observe(host);
    return () => sight.disconnect();
  }, [list, order, calm]);
}
