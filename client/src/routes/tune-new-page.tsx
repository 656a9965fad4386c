import { useQueryClient } from '@tanstack/react-query';
import { Navigate, useNavigate } from 'react-router-dom';
import { createTune } from '../features/tunes/api/tune';
import { libraryKey } from '../features/tunes/api/tune-list';
import { TuneForm } from '../features/tunes/components/tune-form';
import { NEW_TUNE } from '../features/tunes/tune-form-values';
import { BackLink } from '../ui/back-link';
import { Page, PageHeading } from '../ui/page';
import { useSay } from '../ui/status';
import { useAssumedFor } from './use-assumed-for';
import { useCircle } from './use-circle';

export function TuneNewPage() {
  const circle = useCircle();
  const client = useQueryClient();
  const navigate = useNavigate();
  const say = useSay();
  const assumedFor = useAssumedFor(circle.id);
  const back = `/c/${circle.id}/tunes`;
  if (!circle.may('tunes.change')) return <Navigate to={back} replace />;
  return (
    <Page narrow>
      <BackLink to={back}>Tunes</BackLink>
      <PageHeading title="Add a tune" />
      <TuneForm
        initial={NEW_TUNE}
        assumedFor={assumedFor}
        label="Add the tune"
        back={back}
        onSave={async (values) => {
          const tune = await createTune(circle.id, values);
          await client.invalidateQueries({ queryKey: libraryKey(circle.id) });
          say(`“${tune.title}” is in the library.`, {
            label: 'Add another',
            onPress: () => void navigate(`${back}/new`),
          });
          await navigate(`${back}/${tune.id}`);
        }}
      />
    </Page>
  );
}
