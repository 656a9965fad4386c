import { useMutation } from '@tanstack/react-query';
import { signOut } from '../api/sign-in';
import { useSignedOut } from './use-signed-out';

/** Ends this sign-in. */
export function useSignOut() {
  return useMutation({ mutationFn: signOut, onSuccess: useSignedOut() });
}
