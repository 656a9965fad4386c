import { useQuery } from '@tanstack/react-query';
import { getMailState, mailStateKey } from '../api/mail';

/** Whether this server sends mail: a setting of the server, which a page needs to ask once. */
export function useMailState({ enabled = true } = {}) {
  return useQuery({
    queryKey: mailStateKey,
    queryFn: ({ signal }) => getMailState(signal),
    staleTime: Infinity,
    enabled,
  });
}
