import { LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';

export function NotFoundPage() {
  return (
    <Page narrow>
      <PageHeading title="Nothing here" about="The address leads to no page. It may have been mistyped." />
      <LinkButton to="/" look="outline">
        To your circles
      </LinkButton>
    </Page>
  );
}
