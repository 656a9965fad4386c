import { useQueryClient } from '@tanstack/react-query';
import { Navigate, useNavigate } from 'react-router-dom';
import { tuneKey, updateTune } from '../features/tunes/api/tune';
import { libraryKey } from '../features/tunes/api/tune-list';
import { TuneForm } from '../features/tunes/components/tune-form';
import { changesOf, valuesOf } from '../features/tunes/tune-form-values';
import { BackLink } from '../ui/back-link';
import { Page, PageHeading } from '../ui/page';
import { useSay } from '../ui/status';
import { useAssumedFor } from './use-assumed-for';
import { useCircle } from './use-circle';
import { useBackToTunes, useTune } from './use-tune';

export function TuneEditPage() {
  const circle = useCircle();
  const client = useQueryClient();
  const navigate = useNavigate();
  const say = useSay();
  const assumedFor = useAssumedFor(circle.id);
  const back = useBackToTunes();
  const found = useTune();
  if (!found.tune) return found.instead;
  const { tune } = found;
  const here = `/c/${circle.id}/tunes/${tune.id}`;
  if (!circle.may('tunes.change')) return <Navigate to={here} replace />;
  const initial = valuesOf(tune);
  return (
    <Page narrow>
      <BackLink to={here}>{tune.title}</BackLink>
      <PageHeading title="Edit the tune" />
      <TuneForm
        initial={initial}
        assumedFor={assumedFor}
        label="Save"
        back={here}
        onSave={async (values) => {
          const saved = await updateTune(circle.id, tune.id, changesOf(initial, values));
          client.setQueryData(tuneKey(circle.id, tune.id), saved);
          await client.invalidateQueries({ queryKey: libraryKey(circle.id) });
          say('Saved.');
          await navigate(here, { state: { back } });
        }}
      />
    </Page>
  );
}
