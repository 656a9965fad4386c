import { Page, PageHeading } from '../ui/page';

export function TunesPage() {
  return (
    <Page>
      <PageHeading title="Tunes" />
    </Page>
  );
}
