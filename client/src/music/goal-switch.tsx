import type { Goal } from '@pegwell/shared/session/evening';
import { ChoiceSwitch } from '../ui/choice-switch';

interface GoalSwitchProps {
  readonly goal: Goal;
  readonly onGoal: (goal: Goal) => void;
}

const GOALS = [
  { value: 'pegs', label: 'Fewest pegs' },
  { value: 'stops', label: 'Fewest stops' },
] as const;

/** What counts first: pegs turned, or times that the room stops. */
export function GoalSwitch({ goal, onGoal }: GoalSwitchProps) {
  return <ChoiceSwitch legend="What counts first" choices={GOALS} value={goal} onChoose={onGoal} />;
}
