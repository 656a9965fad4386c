import { useMutation, useQueryClient } from '@tanstack/react-query';
import { meKey } from '../api/me';
import { signOut } from '../api/sign-in';

/** Ends this sign-in and forgets everything that was loaded with it. */
export function useSignOut() {
  const client = useQueryClient();
  return useMutation({
    mutationFn: signOut,
    onSuccess: () => {
      client.clear();
      client.setQueryData(meKey, null);
    },
  });
}
