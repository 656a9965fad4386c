import { Page, PageHeading } from '../ui/page';

export function TuningsPage() {
  return (
    <Page>
      <PageHeading title="Tunings" />
    </Page>
  );
}
