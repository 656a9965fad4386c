import { useQueryClient } from '@tanstack/react-query';
import { Navigate, useNavigate } from 'react-router-dom';
import { eveningsKey } from '../features/sessions/api/evening-list';
import { EveningForm } from '../features/sessions/components/evening-form';
import { BackLink } from '../ui/back-link';
import { Page, PageHeading } from '../ui/page';
import { useCircle } from './use-circle';

export function EveningNewPage() {
  const circle = useCircle();
  const client = useQueryClient();
  const navigate = useNavigate();
  const back = `/c/${circle.id}/evenings`;
  if (!circle.may('sessions.change')) return <Navigate to={back} replace />;
  return (
    <Page narrow>
      <BackLink to={back}>Evenings</BackLink>
      <PageHeading title="Plan an evening" />
      <EveningForm
        circleId={circle.id}
        timeZone={circle.timeZone}
        back={back}
        onCreated={async (evening) => {
          await client.invalidateQueries({ queryKey: eveningsKey(circle.id) });
          await navigate(`${back}/${evening.id}`);
        }}
      />
    </Page>
  );
}
