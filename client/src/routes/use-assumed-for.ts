import type { Mode } from '@pegwell/shared/music/mode';
import { useQuery } from '@tanstack/react-query';
import { getUsualTunings, usualTuningsKey } from '../features/circles/api/usual-tunings';
import { usualTuning } from '../features/circles/usual-lookup';

/** What this circle takes a kind to have in a key where a tune says nothing; the built-in table until it is loaded. */
export function useAssumedFor(circleId: string): (kindId: string, key: string, mode: Mode) => string {
  const usual = useQuery({
    queryKey: usualTuningsKey(circleId),
    queryFn: ({ signal }) => getUsualTunings(circleId, signal),
  });
  const items = usual.data?.items ?? [];
  return (kindId, key, mode) => usualTuning(items, kindId, key, mode);
}
