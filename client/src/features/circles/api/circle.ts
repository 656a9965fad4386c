import type { Circle } from '@pegwell/shared/contract/circles';
import { api } from '../../../lib/api';

export const circleKey = (circleId: string) => ['circle', circleId] as const;

export const getCircle = (circleId: string, signal?: AbortSignal) =>
  api.get<Circle>(`/circles/${circleId}`, signal ? { signal } : {});
