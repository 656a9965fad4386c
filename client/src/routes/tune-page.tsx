import { useNavigate } from 'react-router-dom';
import { TuneTunings } from '../features/tunes/components/tune-tunings';
import { TuneWords } from '../features/tunes/components/tune-words';
import { useRemoveTune } from '../features/tunes/hooks/use-remove-tune';
import { keyWords } from '../music/key-words';
import { BackLink } from '../ui/back-link';
import { Button, LinkButton } from '../ui/button';
import { Page, PageHeading } from '../ui/page';
import { useCircle } from './use-circle';
import { useBackToTunes, useTune } from './use-tune';

/** One tune to read: its key, what each instrument is tuned to, where it comes from. */
export function TunePage() {
  const circle = useCircle();
  const navigate = useNavigate();
  const back = useBackToTunes();
  const found = useTune();
  const remove = useRemoveTune(circle.id, () => void navigate(back));
  if (!found.tune) return found.instead;
  const { tune } = found;
  return (
    <Page narrow>
      <BackLink to={back}>Tunes</BackLink>
      <PageHeading
        title={tune.title}
        about={[keyWords(tune.key, tune.mode), tune.rhythm, tune.parts].filter(Boolean).join(' · ')}
      >
        {circle.may('tunes.change') ? (
          <>
            <LinkButton to="edit" state={{ back }}>
              Edit
            </LinkButton>
            <Button look="danger" busy={remove.isPending && 'Removing'} onClick={() => remove.mutate(tune)}>
              Remove
            </Button>
          </>
        ) : null}
      </PageHeading>
      <TuneTunings tune={tune} />
      <TuneWords tune={tune} />
    </Page>
  );
}
