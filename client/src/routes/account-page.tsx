import { useNavigate } from 'react-router-dom';
import { AddressSection } from '../features/accounts/components/address-section';
import { DeleteSection } from '../features/accounts/components/delete-section';
import { NameSection } from '../features/accounts/components/name-section';
import { OwnDataSection } from '../features/accounts/components/own-data-section';
import { PasswordSection } from '../features/accounts/components/password-section';
import { SignInsSection } from '../features/accounts/components/sign-ins-section';
import { useMe } from '../features/accounts/hooks/use-me';
import { useSignedOut } from '../features/accounts/hooks/use-signed-out';
import { Page, PageHeading } from '../ui/page';
import { useSay } from '../ui/status';

/** One's own account, a section for each matter. */
export function AccountPage() {
  const user = useMe().data?.user;
  const say = useSay();
  const navigate = useNavigate();
  const signedOut = useSignedOut();
  // The layout around this page waits for it.
  if (!user) return null;
  return (
    <Page narrow>
      <PageHeading title="Your account" />
      <NameSection user={user} />
      <AddressSection user={user} />
      <PasswordSection />
      <SignInsSection />
      <OwnDataSection />
      <DeleteSection
        onDeleted={() => {
          signedOut();
          void navigate('/sign-in', { replace: true });
          say('Your account is gone.');
        }}
      />
    </Page>
  );
}
