import { useNavigate, useSearchParams } from 'react-router-dom';
import { useRenewMe } from '../features/accounts/hooks/use-renew-me';

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
  const renewMe = useRenewMe();
  const navigate = useNavigate();
  const next = useNext();
  return async () => {
    await renewMe();
    await navigate(next, { replace: true });
  };
}
