import { Page, PageHeading } from '../ui/page';

export function RoomPage() {
  return (
    <Page>
      <PageHeading title="Follow the evening" />
    </Page>
  );
}
