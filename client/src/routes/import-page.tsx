import { Page, PageHeading } from '../ui/page';

export function ImportPage() {
  return (
    <Page>
      <PageHeading title="Import tunes" />
    </Page>
  );
}
