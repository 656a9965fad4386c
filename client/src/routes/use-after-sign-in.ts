import { useQueryClient } from '@tanstack/react-query';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { getMe, meKey } from '../features/accounts/api/me';

/** Only a path of this site is followed; `//elsewhere` and `/\elsewhere` would leave it. */
export function safeNext(next: string | null): string {
  return next && /^\/(?![/\\])/.test(next) ? next : '/';
}

/** Where the reader wanted to go before signing in. */
export function useNext(): string {
  const [params] = useSearchParams();
  return safeNext(params.get('next'));
}

/** Learns who signed in, then goes on to where the reader wanted to be. */
export function useAfterSignIn(): () => Promise<void> {
  const client = useQueryClient();
  const navigate = useNavigate();
  const next = useNext();
  return async () => {
    client.setQueryData(meKey, await getMe());
    await navigate(next, { replace: true });
  };
}
