import { useQueryClient } from '@tanstack/react-query';
import { meKey } from '../api/me';

/** Forgets everything that was loaded with a sign-in that has ended. */
export function useSignedOut(): () => void {
  const client = useQueryClient();
  return () => {
    // Not the query itself: a header that stays where it is would go on showing what it had.
    client.setQueryData(meKey, null);
    client.removeQueries({ predicate: ({ queryKey }) => queryKey[0] !== meKey[0] });
    client.getMutationCache().clear();
  };
}
