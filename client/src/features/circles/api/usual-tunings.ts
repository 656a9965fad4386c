import type { SetUsualTunings, UsualTuning } from '@pegwell/shared/contract/circles';
import { api } from '../../../lib/api';

interface UsualTunings {
  readonly items: readonly UsualTuning[];
}

export const usualTuningsKey = (circleId: string) => ['circle', circleId, 'usual-tunings'] as const;

export const getUsualTunings = (circleId: string, signal?: AbortSignal) =>
  api.get<UsualTunings>(`/circles/${circleId}/usual-tunings`, signal ? { signal } : {});

/** Replaces all rows of the circle's own; an empty list is the built-in table. */
export const setUsualTunings = (circleId: string, rows: SetUsualTunings) =>
  api.put<UsualTunings>(`/circles/${circleId}/usual-tunings`, rows);
