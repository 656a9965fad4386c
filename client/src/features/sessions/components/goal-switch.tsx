import type { Goal } from '@pegwell/shared/session/evening';
import styles from './goal-switch.module.css';

interface GoalSwitchProps {
  readonly goal: Goal;
  readonly onGoal: (goal: Goal) => void;
}

const GOALS = [
  { goal: 'pegs', label: 'Fewest pegs' },
  { goal: 'stops', label: 'Fewest stops' },
] as const;

/** What counts first: pegs turned, or times that the room stops. */
export function GoalSwitch({ goal, onGoal }: GoalSwitchProps) {
  return (
    <fieldset className={styles.goals}>
      <legend className="visually-hidden">What counts first</legend>
      {GOALS.map((each) => (
        <label key={each.goal}>
          <input type="radio" name="goal" checked={goal === each.goal} onChange={() => onGoal(each.goal)} />
          <span>{each.label}</span>
        </label>
      ))}
    </fieldset>
  );
}
