import { useQuery } from '@tanstack/react-query';
import { getMe, meKey } from '../api/me';

/** `data` is null when nobody is signed in. Kept for a minute; signing in and out renew it. */
export function useMe() {
  return useQuery({ queryKey: meKey, queryFn: ({ signal }) => getMe(signal), staleTime: 60_000 });
}
