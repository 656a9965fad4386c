import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '../../../ui/button';
import { Failing, Loading } from '../../../ui/states';
import { useSay } from '../../../ui/status';
import { getUsualTunings, setUsualTunings, usualTuningsKey } from '../api/usual-tunings';
import { UsualForm } from './usual-form';
import { UsualTable } from './usual-table';
import styles from './usual.module.css';

interface UsualSectionProps {
  readonly circleId: string;
  readonly kind: InstrumentKind;
  readonly mayChange: boolean;
}

/** The circle's usual tunings of one kind: what is assumed where a tune says nothing. */
export function UsualSection({ circleId, kind, mayChange }: UsualSectionProps) {
  const client = useQueryClient();
  const say = useSay();
  const [editing, setEditing] = useState(false);
  const usual = useQuery({
    queryKey: usualTuningsKey(circleId),
    queryFn: ({ signal }) => getUsualTunings(circleId, signal),
  });
  return (
    <section aria-labelledby="usual">
      <div className={styles.title}>
        <h2 id="usual">When a tune says nothing</h2>
        {mayChange && usual.data && !editing ? (
          <Button look="outline" onClick={() => setEditing(true)}>
            Change these
          </Button>
        ) : null}
      </div>
      <p className={styles.how}>
        {`Taken for a ${kind.name.toLowerCase()} wherever a tune says nothing of it, and shown as assumed.`}
      </p>
      {usual.isError ? (
        <Failing
          title="The usual tunings could not be loaded"
          error={usual.error}
          onRetry={() => void usual.refetch()}
        />
      ) : !usual.data ? (
        <Loading what="the usual tunings" />
      ) : editing ? (
        <UsualForm
          kind={kind}
          items={usual.data.items}
          onLeave={() => setEditing(false)}
          onSave={async (items) => {
            const saved = await setUsualTunings(circleId, { items });
            client.setQueryData(usualTuningsKey(circleId), saved);
            setEditing(false);
            say('Saved. Tunes that say nothing go by it from now on.');
            // What tunes and evenings assume has changed with it.
            await client.invalidateQueries({ queryKey: ['tunes', circleId] });
            await client.invalidateQueries({ queryKey: ['session'] });
          }}
        />
      ) : (
        <UsualTable items={usual.data.items} kindId={kind.id} />
      )}
    </section>
  );
}
