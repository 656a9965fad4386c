import type { Racks } from '@pegwell/shared/contract/racks';
import { DEFERENCE } from '@pegwell/shared/music/caution';
import { TURNING_HABITS } from '@pegwell/shared/music/retune-steps';
import { useState } from 'react';
import { useSearchParams } from 'react-router-dom';
import { Button } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { EmptyState } from '../../../ui/states';
import { useRackChanges } from '../hooks/use-rack-changes';
import { RackDialog } from './rack-dialog';
import { RackPlayers } from './rack-players';
import { RackSection } from './rack-section';
import styles from './racks-view.module.css';

interface RacksViewProps {
  readonly sessionId: string;
  readonly racks: Racks;
  readonly mayChange: boolean;
}

/** The players of an evening who bring instruments of their own, and the plan of one of them. */
export function RacksView({ sessionId, racks, mayChange: allowed }: RacksViewProps) {
  const { evening, items } = racks;
  const over = evening.status === 'finished';
  const mayChange = allowed && !over;
  const { save, remove } = useRackChanges(sessionId);
  const [search, setSearch] = useSearchParams();
  const shown = items.find(({ id }) => id === search.get('player')) ?? items[0];
  /** Whose instruments are being written down; `new` for somebody who is added. */
  const [editing, setEditing] = useState<string | null>(null);
  const edited = items.find(({ id }) => id === editing) ?? null;
  const add = (look: 'solid' | 'outline') =>
    mayChange ? (
      <Button look={look} onClick={() => setEditing('new')}>
        Add a player
      </Button>
    ) : null;
  return (
    <>
      <PageHeading
        title="The instruments you bring"
        about="Which to play for which tune, and what to turn when, for the order on the board."
      >
        {items.length > 0 ? add('outline') : null}
      </PageHeading>
      {items.length === 0 ? (
        <EmptyState title="Nobody is down with instruments of their own" action={add('solid')}>
          {over
            ? 'This evening is over.'
            : mayChange
              ? 'Somebody with two fiddles turns fewer pegs. Write down what they bring, and see the plan.'
              : 'Bringing two? Tell a host, and the plan for yours stands here.'}
        </EmptyState>
      ) : null}
      {items.length > 1 ? <RackPlayers items={items} shown={shown?.id ?? ''} /> : null}
      {shown ? (
        <RackSection
          key={shown.id}
          rack={shown}
          sets={evening.sets}
          mayChange={mayChange}
          onEdit={() => setEditing(shown.id)}
          onRemove={() => void remove(shown)}
        />
      ) : null}
      {shown?.plan && shown.plan.turns.length > 0 ? (
        <div className={styles.habits}>
          {TURNING_HABITS.map((habit) => (
            <p key={habit}>{habit}</p>
          ))}
          <p>{DEFERENCE}</p>
        </div>
      ) : null}
      {editing === 'new' || edited ? (
        <RackDialog
          evening={evening}
          rack={edited}
          onSave={async (content) => {
            const { id } = await save(edited, content);
            setSearch({ player: id }, { replace: true });
          }}
          onClose={() => setEditing(null)}
        />
      ) : null}
    </>
  );
}
