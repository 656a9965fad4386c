import { Page, PageHeading } from '../ui/page';

export function ConsolePage() {
  return (
    <Page>
      <PageHeading title="The evening, live" />
    </Page>
  );
}
