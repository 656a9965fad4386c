import { Page, PageHeading } from '../ui/page';

export function RecordPage() {
  return (
    <Page>
      <PageHeading title="Record" />
    </Page>
  );
}
