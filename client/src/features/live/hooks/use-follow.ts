import { useCallback, useEffect, useMemo, useRef, useState } from 'react';
import { Follower, type Heard } from '../follower';
import { normalCode } from '../kept-answers';

/**
 * Follows an evening while the page is open, for some kinds or for those that retune in the room.
 * @returns what was heard last, and a way to ask at once
 */
export function useFollow(
  typedCode: string,
  kinds: readonly string[] | 'room',
): Heard & { readonly askNow: () => void } {
  const code = normalCode(typedCode);
  const list = kinds === 'room' ? kinds : kinds.join(' ');
  // Begins with what the device has kept, so that a page without a signal is not empty.
  const kept = useMemo(() => new Follower(code, listed(list), () => undefined).current(), [code, list]);
  const [heard, setHeard] = useState<{ readonly of: string; readonly heard: Heard } | null>(null);
  const follower = useRef<Follower | null>(null);
  const of = `${code} ${list}`;

  useEffect(() => {
    const following = new Follower(code, listed(list), (news) => setHeard({ of, heard: news }));
    follower.current = following;
    following.start();
    return () => following.stop();
  }, [code, list, of]);

  const askNow = useCallback(() => follower.current?.askNow(), []);
  return { ...(heard?.of === of ? heard.heard : kept), askNow };
}

const listed = (list: string): readonly string[] | 'room' => (list === 'room' ? list : list.split(' '));
