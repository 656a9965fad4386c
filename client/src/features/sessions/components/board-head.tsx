import type { Session } from '@pegwell/shared/contract/sessions';
import { entriesOf } from '@pegwell/shared/session/board';
import { eveningMinutes } from '@pegwell/shared/session/minutes';
import { Link } from 'react-router-dom';
import { count, lengthOf, listOf, momentOf } from '../../../lib/format';
import { ActionMenu, type ActionItem } from '../../../ui/action-menu';
import { Button, LinkButton } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { sheetUrl } from '../api/session';
import { chairWords } from '../../../pictures/changing-kinds';
import type { BoardInHand } from '../hooks/use-board';
import type { ScoredBoard } from '../hooks/use-scored';
import { Figures, otherFigures } from './figures';
import { GoalSwitch } from '../../../music/goal-switch';
import { SaveState } from './save-state';
import styles from './board-head.module.css';

interface BoardHeadProps {
  readonly held: BoardInHand;
  /** As it is on screen: while a card is dragged, as it would be. */
  readonly scored: ScoredBoard;
  readonly before?: ScoredBoard | undefined;
  readonly mayChange: boolean;
  readonly onSuggest: () => void;
  readonly onGoal: (goal: Session['goal']) => void;
  readonly onDetails: () => void;
  readonly onFollow: () => void;
}

/** What and when, what it costs, and what can be done with the evening as a whole. */
export function BoardHead(props: BoardHeadProps) {
  const { held, scored, before, mayChange } = props;
  const { session, board } = held;
  const entries = entriesOf(board);
  const tunes = entries.filter(({ open }) => !open).length;
  const open = entries.length - tunes;
  const sets = board.sets.filter((set) => set.entries.length > 0);
  const minutes = eveningMinutes(
    sets.map((set) => set.entries),
    scored.places,
  );
  const parts = [
    momentOf(session.startsAt, session.timeZone),
    session.place,
    count(tunes, 'tune'),
    open > 0 ? count(open, 'open place') : null,
    entries.length > 0
      ? `about ${lengthOf(minutes)}${sets.length === 2 ? ' with the break' : sets.length > 2 ? ' with breaks' : ''}`
      : null,
    scored.evening.chairs.length > 0 ? `${listOf(scored.evening.chairs.map(chairWords))} retune` : null,
  ];
  const others = otherFigures(scored.score);
  const sheets: ActionItem[] = (['a4', 'letter'] as const).map((paper) => ({
    id: paper,
    label: `Set sheet on ${paper === 'a4' ? 'A4' : 'Letter'} paper`,
    onSelect: () => window.open(sheetUrl(session.id, paper), '_blank', 'noopener'),
  }));
  const live = session.status === 'live';
  return (
    <>
      <PageHeading title={session.title} about={parts.filter(Boolean).join(' · ')}>
        <Figures score={scored.score} places={scored.places} before={before?.score} />
        {mayChange && entries.length > 1 ? (
          <Button className={styles.suggest} onClick={props.onSuggest}>
            Suggest an order
          </Button>
        ) : null}
      </PageHeading>
      <div className={styles.bar}>
        {mayChange ? <GoalSwitch goal={session.goal} onGoal={props.onGoal} /> : null}
        <div className={styles.state}>
          {others.length > 0 ? <p className={styles.others}>{others.join(' · ')}</p> : null}
          {mayChange ? <SaveState {...held} /> : null}
          {live ? <p className={styles.live}>On now: what is left is counted.</p> : null}
        </div>
        <div className={styles.deeds}>
          {mayChange ? (
            <>
              <Button
                look="quiet"
                disabled={held.undo === null}
                title={held.undo ? `Undo: ${held.undo}` : 'Nothing to undo'}
                onClick={() => held.takeBack()}
              >
                Undo
              </Button>
              <Button
                look="quiet"
                disabled={held.redo === null}
                title={held.redo ? `Redo: ${held.redo}` : 'Nothing to redo'}
                onClick={() => held.doAgain()}
              >
                Redo
              </Button>
              <Button look="quiet" onClick={props.onDetails}>
                Details
              </Button>
            </>
          ) : null}
          <ActionMenu groups={[sheets]} trigger={<Button look="quiet">Sheet</Button>} />
          <Button look="quiet" onClick={props.onFollow}>
            Follow code
          </Button>
          <LinkButton look="quiet" to="racks">
            Instruments
          </LinkButton>
          {mayChange ? (
            <Link className={styles.run} to="live">
              {live ? 'Run the evening: on now' : 'Run the evening'}
            </Link>
          ) : null}
        </div>
      </div>
      {held.problems.length > 0 ? (
        <div className={styles.problems} role="alert">
          {held.problems.map((problem) => (
            <p key={problem}>{problem}</p>
          ))}
          <Button look="plain" onClick={held.dismissProblems}>
            Put away
          </Button>
        </div>
      ) : null}
    </>
  );
}
