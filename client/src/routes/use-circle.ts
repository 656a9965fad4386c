import type { Circle } from '@pegwell/shared/contract/circles';
import type { CircleAction } from '@pegwell/shared/policy';
import { useOutletContext } from 'react-router-dom';

export interface CircleHere extends Circle {
  /** Whether the reader may do this here; the server decides again. */
  readonly may: (action: CircleAction) => boolean;
}

/** The circle of the page's address, for pages under /c/:circleId. */
export function useCircle(): CircleHere {
  const circle = useOutletContext<Circle>();
  return { ...circle, may: (action) => circle.can.includes(action) };
}
