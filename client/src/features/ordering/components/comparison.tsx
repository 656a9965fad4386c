import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import type { Board } from '@pegwell/shared/session/board';
import { compareScores } from '@pegwell/shared/session/score';
import { useMemo } from 'react';
import { Button } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { alignOrder, partsOf, proofWords, scoreOrder, type Order } from '../compare';
import { OrderPicture } from './order-picture';
import { Reasons } from './reasons';
import styles from './suggestion.module.css';

interface ComparisonProps {
  readonly session: Session;
  readonly board: Board<ShownEntry>;
  readonly suggestion: SessionSuggestion;
  readonly onTake: (label: string, version: number, order: Order) => void;
  readonly onKeep: () => void;
  readonly onAskAgain: () => void;
}

/** Both orders on lanes, what is proved, what moves and why. */
export function Comparison({ session, board, suggestion, onTake, onKeep, onAskAgain }: ComparisonProps) {
  const { goal, version } = suggestion;
  const order = useMemo(() => alignOrder(board, suggestion.sets), [board, suggestion.sets]);
  const before = useMemo(() => scoreOrder(session, board, goal), [session, board, goal]);
  const after = useMemo(() => scoreOrder(session, board, goal, order), [session, board, goal, order]);
  const parts = useMemo(() => partsOf(session, board, goal, order), [session, board, goal, order]);

  const keep = (
    <Button look="outline" onClick={onKeep}>
      Keep mine
    </Button>
  );
  if (version !== session.version) {
    return (
      <>
        <PageHeading
          title={`An order for ${session.title}`}
          about={`${session.updatedBy ?? 'Somebody'} changed the evening meanwhile; this order was for the board before.`}
        >
          <Button onClick={onAskAgain}>Ask again</Button>
          {keep}
        </PageHeading>
      </>
    );
  }

  const better = compareScores(after.score, before.score, goal) < 0;
  const needed = goal === 'pegs' ? after.score.pegChanges : after.score.retuneStops;
  const proof = proofWords(suggestion, needed);
  if (!better) {
    return (
      <>
        <PageHeading title="Your order is as good as any found" about={proof.words}>
          <Button onClick={onKeep}>Keep it</Button>
        </PageHeading>
        <OrderPicture compared={before} goal={goal} heading="as you have it" />
      </>
    );
  }
  const filled = board.sets.filter(({ entries }) => entries.length > 0).length;
  return (
    <>
      <PageHeading
        title={`A better order for ${session.title}`}
        about={`Same tunes, ${filled === 1 ? 'same set' : `same ${filled} sets`}. Nothing changes until you take it.`}
      >
        <Button onClick={() => onTake('Took the suggested order', version, order)}>Take this order</Button>
        {parts.map((part) => (
          <Button
            key={part.setId}
            look="outline"
            onClick={() =>
              onTake(`Took an order for ${part.label.replace('Only ', '')}`, version, part.order)
            }
          >
            {part.label}
          </Button>
        ))}
        {keep}
      </PageHeading>
      <div className={styles.orders}>
        <OrderPicture compared={before} goal={goal} heading="as you have it" />
        <OrderPicture compared={after} goal={goal} heading="suggested" proof={proof} />
      </div>
      <Reasons session={session} goal={goal} before={before} after={after} />
    </>
  );
}
