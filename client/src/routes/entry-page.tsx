import type { ComponentType } from 'react';
import { Navigate } from 'react-router-dom';
import { useMe } from '../features/accounts/hooks/use-me';
import { Entry } from './entry';
import { useAfterSignIn, useNext } from './use-after-sign-in';

interface EntryPageProps {
  readonly title: string;
  readonly form: ComponentType<{ readonly onSignedIn: () => Promise<void> }>;
  /** The other way in. */
  readonly other: { readonly words: string; readonly link: string; readonly to: string };
}

/** A way in for somebody who is not signed in; whoever is goes on to where they wanted to be. */
export function EntryPage({ title, form: Form, other }: EntryPageProps) {
  const me = useMe();
  const next = useNext();
  const afterSignIn = useAfterSignIn();
  if (me.data) return <Navigate to={next} replace />;
  const to = `${other.to}${next === '/' ? '' : `?next=${encodeURIComponent(next)}`}`;
  return <Entry title={title} form={<Form onSignedIn={afterSignIn} />} other={{ ...other, to }} />;
}
