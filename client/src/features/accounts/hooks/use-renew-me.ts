import { useQueryClient } from '@tanstack/react-query';
import { getMe, meKey } from '../api/me';

/** Asks anew who is signed in and their circles, after that changed. */
export function useRenewMe(): () => Promise<void> {
  const client = useQueryClient();
  return async () => {
    client.setQueryData(meKey, await getMe());
  };
}
