import { Page, PageHeading } from '../ui/page';

export function CodePage() {
  return (
    <Page>
      <PageHeading title="Follow the evening" />
    </Page>
  );
}
