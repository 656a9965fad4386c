import { useQuery } from '@tanstack/react-query';
import { countTunes, libraryKey } from '../features/tunes/api/tune-list';
import { count } from '../lib/format';
import { LinkButton } from '../ui/button';
import { EmptyState, Loading } from '../ui/states';
import styles from './evenings-page.module.css';
import type { CircleHere } from './use-circle';

/** What stands in place of evenings before there is one: for a host the way there, step by step. */
export function FirstSteps({ circle }: { readonly circle: CircleHere }) {
  const tunes = useQuery({
    queryKey: [...libraryKey(circle.id), 'count'],
    queryFn: ({ signal }) => countTunes(circle.id, signal),
  });
  if (!circle.may('sessions.change'))
    return (
      <EmptyState title="No evening yet">
        When the host has planned one it stands here, with its tunes and a code to follow it by.
      </EmptyState>
    );
  if (tunes.isPending) return <Loading what="the first steps" />;
  // Where the count cannot be had, both ways stay open.
  const number = tunes.data ?? 0;
  const home = `/c/${circle.id}`;
  return (
    <ol className={styles.steps}>
      <li className={number === 0 ? styles.next : undefined}>
        <span className={styles.number} aria-hidden="true">
          1
        </span>
        <div>
          <h2>{number === 0 ? 'First, bring your tunes' : `Your tunes: ${count(number, 'tune')}`}</h2>
          {number === 0 ? (
            <>
              <p>
                A list from a spreadsheet or from ABC; titles and keys are enough. Pegwell plans the evening
                out of them.
              </p>
              <div className={styles.do}>
                <LinkButton to={`${home}/tunes/import`}>Import a list</LinkButton>
                <LinkButton look="outline" to={`${home}/tunes/new`}>
                  Add one by hand
                </LinkButton>
              </div>
            </>
          ) : (
            <p>More can come at any time, one by one or as a list.</p>
          )}
        </div>
      </li>
      <li className={number > 0 ? styles.next : undefined}>
        <span className={styles.number} aria-hidden="true">
          2
        </span>
        <div>
          <h2>Plan an evening</h2>
          <p>
            When, where and who retunes. Then put tunes on its board and see what every change costs in pegs.
          </p>
          <div className={styles.do}>
            <LinkButton look={number > 0 ? 'solid' : 'outline'} to={`${home}/evenings/new`}>
              Plan the first evening
            </LinkButton>
          </div>
        </div>
      </li>
      <li>
        <span className={styles.number} aria-hidden="true">
          3
        </span>
        <div>
          <h2>Play it</h2>
          <p>
            Everyone in the room follows on the phone by the evening’s code. Nobody needs an account for that.
          </p>
        </div>
      </li>
    </ol>
  );
}
