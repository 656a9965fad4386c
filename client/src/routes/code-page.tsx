import { useNavigate } from 'react-router-dom';
import { CodeForm } from '../features/live/components/code-form';
import styles from '../features/live/components/follow.module.css';
import { useLight } from '../theme/light';
import { Mark } from '../ui/mark';
import phone from '../ui/phone.module.css';

/** Where a code is typed in: for those who cannot scan it. */
export function CodePage() {
  useLight('phone');
  const navigate = useNavigate();
  return (
    <div className={phone.page}>
      <title>Follow the evening · Pegwell</title>
      <header className={phone.top}>
        <Mark />
      </header>
      <main className={styles.plain}>
        <h1>Follow the evening</h1>
        <p>See what is played, what your instrument is tuned to, and which peg to turn next.</p>
        <CodeForm onCode={(code) => void navigate(`/f/${code}`)} />
      </main>
    </div>
  );
}
