import { useQueryClient } from '@tanstack/react-query';
import { Console } from '../features/live/components/console';
import { sessionKey } from '../features/sessions/api/session';
import { EveningLoaded } from './evening-loaded';

/** The evening while it is played. */
export function ConsolePage() {
  const queries = useQueryClient();
  return (
    <EveningLoaded>
      {(session) => (
        <Console
          session={session}
          onStep={() => void queries.invalidateQueries({ queryKey: sessionKey(session.id) })}
        />
      )}
    </EveningLoaded>
  );
}
