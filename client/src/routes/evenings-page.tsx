import { Page, PageHeading } from '../ui/page';

export function EveningsPage() {
  return (
    <Page>
      <PageHeading title="Evenings" />
    </Page>
  );
}
