import type { SessionSuggestion } from '@pegwell/shared/contract/ordering';
import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { setTitle, type Board } from '@pegwell/shared/session/board';
import type { Goal } from '@pegwell/shared/session/evening';
import { compareScores } from '@pegwell/shared/session/score';
import { useMemo } from 'react';
import { count } from '../../../lib/format';
import { GoalSwitch } from '../../../music/goal-switch';
import { Button } from '../../../ui/button';
import { ChoiceSwitch } from '../../../ui/choice-switch';
import { PageHeading } from '../../../ui/page';
import { Failing, Loading } from '../../../ui/states';
import { alignOrder, proofWords, scoreOrder } from '../compare';
import type { Scope, Suggested } from '../hooks/use-suggestions';
import { verdict } from '../verdict';
import { HeldBack } from './held-back';
import { OrderColumns } from './order-columns';
import { OrderPicture } from './order-picture';
import { OrderPictures } from './order-pictures';
import styles from './suggestion.module.css';
import type { Taken } from '../taken';

interface ComparisonProps {
  readonly session: Session;
  readonly board: Board<ShownEntry>;
  readonly goal: Goal;
  readonly scope: Scope;
  /** Sets that can be put in order alone. */
  readonly setIds: readonly string[];
  readonly whole: SessionSuggestion;
  readonly of: (setId: string) => Suggested | undefined;
  readonly onGoal: (goal: Goal) => void;
  readonly onScope: (scope: Scope) => void;
  readonly onTake: (taken: Taken) => void;
  readonly onKeep: () => void;
  readonly onAskAgain: () => void;
}

/** Both orders on lanes: what is better and why, what is proved, what moves, and what holds it back. */
export function Comparison(props: ComparisonProps) {
  const { session, board, goal, scope, setIds, whole, of, onTake, onKeep } = props;
  const asked = scope === null ? undefined : of(scope);
  const suggestion = scope === null ? whole : asked?.data;
  const before = useMemo(() => scoreOrder(session, board, goal), [session, board, goal]);
  const order = useMemo(() => suggestion && alignOrder(board, suggestion.sets), [board, suggestion]);
  const after = useMemo(
    () => order && scoreOrder(session, board, goal, order),
    [session, board, goal, order],
  );
  const keep = (
    <Button look="outline" onClick={onKeep}>
      Keep mine
    </Button>
  );

  if ((suggestion ?? whole).version !== session.version) {
    return (
      <PageHeading
        title={`An order for ${session.title}`}
        about={`${session.updatedBy ?? 'Somebody'} changed the evening meanwhile; this order was for the board before.`}
      >
        <Button onClick={props.onAskAgain}>Ask again</Button>
        {keep}
      </PageHeading>
    );
  }

  const setIndex = board.sets.findIndex(({ id }) => id === scope);
  const name = scope === null ? null : nameOf(board, setIndex);
  const better = after !== undefined && compareScores(after.score, before.score, goal) < 0;
  const filled = board.sets.filter(({ entries }) => entries.length > 0).length;
  const figure = (score: { pegChanges: number; retuneStops: number } | undefined) =>
    score
      ? count(goal === 'pegs' ? score.pegChanges : score.retuneStops, goal === 'pegs' ? 'peg' : 'stop')
      : '…';
  const scopes = [
    { value: '', label: <ScopeLabel name="The whole evening" figure={figure(whole.after)} /> },
    ...setIds.map((setId) => ({
      value: setId,
      label: (
        <ScopeLabel
          name={`Only ${nameOf(
            board,
            board.sets.findIndex(({ id }) => id === setId),
          )}`}
          figure={figure(of(setId)?.data?.after)}
        />
      ),
    })),
  ];
  const controls = (
    <div className={styles.controls}>
      {setIds.length > 0 ? (
        <div className={styles.scopes}>
          <ChoiceSwitch
            legend="What to put in order"
            choices={scopes}
            value={scope ?? ''}
            onChoose={(value) => props.onScope(value || null)}
          />
        </div>
      ) : null}
      <GoalSwitch goal={goal} onGoal={props.onGoal} />
    </div>
  );
  if (!suggestion || !order || !after) {
    return (
      <>
        <PageHeading title={`An order for ${session.title}`} about={`Only ${name} is put in order.`}>
          {keep}
        </PageHeading>
        {controls}
        {asked?.isError ? (
          <Failing
            title="No order could be suggested"
            error={asked.error}
            onRetry={() => void asked.refetch()}
          />
        ) : (
          <Loading what="a better order" />
        )}
      </>
    );
  }

  const needed = goal === 'pegs' ? after.score.pegChanges : after.score.retuneStops;
  const proof = proofWords(suggestion, needed, name ?? 'these tunes');
  if (!better) {
    return (
      <>
        <PageHeading
          title={
            name ? `Your order of ${name} is as good as any found` : 'Your order is as good as any found'
          }
          about={proof.words}
        >
          <Button onClick={onKeep}>Keep it</Button>
        </PageHeading>
        {controls}
        <OrderPicture compared={before} goal={goal} heading="as you have it" />
        <div className={styles.alone}>
          <HeldBack {...{ session, scope, order }} after={before} />
        </div>
      </>
    );
  }
  const [what, why] = verdict(before, after, goal);
  const stays = name ? `Everything outside ${name} stays as it is.` : `Same tunes, ${sameSets(filled)}.`;
  return (
    <>
      <PageHeading
        title={`A better order for ${session.title}`}
        about={`${stays} Nothing changes until you take it.`}
      >
        <Button
          onClick={() =>
            onTake({
              label: `Took the suggested order${name ? ` of ${name}` : ''}`,
              version: suggestion.version,
              ...{ order, goal },
            })
          }
        >
          {name ? `Take ${name}` : 'Take this order'}
        </Button>
        {keep}
      </PageHeading>
      <p className={styles.verdict}>
        <strong>{what}</strong> {why}
      </p>
      {controls}
      <OrderPictures {...{ before, after, goal, proof }} />
      <div className={styles.detail}>
        <OrderColumns {...{ before, after, scope }} />
        <HeldBack {...{ session, scope, order, after }} />
      </div>
    </>
  );
}

function ScopeLabel({ name, figure }: { readonly name: string; readonly figure: string }) {
  return (
    <span className={styles.scope}>
      {name} <small>{figure}</small>
    </span>
  );
}

const sameSets = (filled: number): string => (filled === 1 ? 'same set' : `same ${filled} sets`);

/** `the first set`; a name of the host's own stands as it is. */
function nameOf(board: Board<ShownEntry>, index: number): string {
  const title = setTitle(board.sets[index]?.title ?? '', index);
  return /^\w+ set$/.test(title) ? `the ${title.toLowerCase()}` : title;
}
