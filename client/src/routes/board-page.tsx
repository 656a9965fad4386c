import { Page, PageHeading } from '../ui/page';

export function BoardPage() {
  return (
    <Page>
      <PageHeading title="Evening" />
    </Page>
  );
}
