import { Button } from '../../../ui/button';
import { useSay } from '../../../ui/status';
import { FollowCode } from './follow-code';
import { spaced } from './follow-foot';
import styles from './console.module.css';

interface ConsolePlayersProps {
  readonly url: string;
  readonly code: string;
}

/** How players follow: a code to scan, an address, eight letters to type. */
export function ConsolePlayers({ url, code }: ConsolePlayersProps) {
  const say = useSay();
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(url);
      say('The address is copied.');
    } catch {
      say('The browser does not let pages copy here. Select the address and copy it.');
    }
  };
  return (
    <section className={styles.players} aria-label="For the players">
      <FollowCode url={url} />
      <div>
        <h3>For the players</h3>
        <p>
          Scan it, or type <b>{spaced(code)}</b> at
        </p>
        <p className={styles.url}>{url.replace(/\/[^/]+$/, '')}</p>
        <Button look="outline" onClick={() => void copy()}>
          Copy the address
        </Button>
      </div>
    </section>
  );
}
