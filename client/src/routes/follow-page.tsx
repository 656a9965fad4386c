import { Page, PageHeading } from '../ui/page';

export function FollowPage() {
  return (
    <Page>
      <PageHeading title="Follow the evening" />
    </Page>
  );
}
