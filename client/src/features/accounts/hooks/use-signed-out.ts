import { useQueryClient } from '@tanstack/react-query';
import { meKey } from '../api/me';

/**
 * Forgets everything that was loaded with a sign-in that has ended. What is on the page now is not told, or it would
 * lead to the sign-in page and from there back to itself: whoever calls this goes to another address.
 */
export function useSignedOut(): () => void {
  const client = useQueryClient();
  return () => {
    client.clear();
    client.setQueryData(meKey, null);
  };
}
