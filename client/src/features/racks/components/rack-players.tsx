import type { Rack } from '@pegwell/shared/contract/racks';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { Link } from 'react-router-dom';
import { instrumentsWords, pegsWords, stopsWords } from '../rack-words';
import styles from './racks-view.module.css';

interface RackPlayersProps {
  readonly items: readonly Rack[];
  /** Id of the one whose plan is shown. */
  readonly shown: string;
}

/** Everybody with what they bring and what it costs them; a press shows one plan. */
export function RackPlayers({ items, shown }: RackPlayersProps) {
  return (
    <nav className={styles.players} aria-label="Players">
      {items.map(({ id, player, kind: kindId, instruments, plan }) => {
        const kind = builtInKind(kindId);
        return (
          <Link key={id} to={`?player=${id}`} replace aria-current={id === shown ? 'true' : undefined}>
            <b>{player}</b>
            <span>{kind ? instrumentsWords(kind, instruments.length) : kindId}</span>
            <span>{plan ? `${pegsWords(plan.cost)}, ${stopsWords(plan.cost)}` : 'no plan'}</span>
          </Link>
        );
      })}
    </nav>
  );
}
