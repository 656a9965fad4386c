import { Page, PageHeading } from '../ui/page';

export function PeoplePage() {
  return (
    <Page>
      <PageHeading title="People" />
    </Page>
  );
}
