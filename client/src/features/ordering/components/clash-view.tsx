import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, type Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { entryTitle } from '../../../music/entry-title';
import { Button } from '../../../ui/button';
import { PageHeading } from '../../../ui/page';
import { wayOut, type Clash, type WayOut } from '../clashes';
import styles from './clash-view.module.css';

interface ClashViewProps {
  readonly session: Session;
  readonly board: Board<ShownEntry>;
  /** Why they cannot all hold, as the server says it. */
  readonly sentence: string;
  /** None of which can be left out. */
  readonly clashes: readonly Clash[];
  /** False where nothing came of it. */
  readonly perform: (label: string, operations: readonly BoardOperation<ShownEntry>[]) => boolean;
  readonly onAgain: () => void;
  readonly onKeep: () => void;
}

/** Rules that no order keeps: the sentence, the cards it speaks of, and what would let an order be. */
export function ClashView({ session, board, sentence, clashes, perform, onAgain, onKeep }: ClashViewProps) {
  const numbered = new Map(entriesOf(board).map((entry, index) => [entry.id, { entry, number: index + 1 }]));
  const leave = (out: WayOut) => {
    if (perform(out.done, [out.operation])) onAgain();
  };
  return (
    <>
      <PageHeading
        title="No order keeps all your rules"
        about="Leave one of them out, and an order is looked for."
      >
        <Button look="outline" onClick={onKeep}>
          Back to the board
        </Button>
      </PageHeading>
      <p className={styles.sentence} role="alert">
        {sentence}
      </p>
      <ol className={styles.rules}>
        {clashes.map((clash) => {
          const out = wayOut(session, board, clash);
          return (
            <li key={`${clash.rule} ${clash.ids.join(' ')}`} className={styles.rule}>
              <ol className={styles.cards}>
                {clash.ids.map((id) => {
                  const { entry, number } = numbered.get(id) ?? {};
                  return entry ? (
                    <li key={id} className={styles.card}>
                      <span className={styles.number}>{number}</span>
                      <b>{entryTitle(entry)}</b>
                    </li>
                  ) : null;
                })}
              </ol>
              <p className={styles.what}>{out ? out.rule : 'Called already: it stays at its place'}</p>
              {out ? (
                <Button
                  look="outline"
                  aria-label={`${out.does}: ${clash.ids.map(title).join(', ')}`}
                  onClick={() => leave(out)}
                >
                  {out.does}
                </Button>
              ) : null}
            </li>
          );
        })}
      </ol>
    </>
  );

  function title(id: string): string {
    const entry = numbered.get(id)?.entry;
    return entry ? entryTitle(entry) : '';
  }
}
