import type { CreateTune, Tune, UpdateTune } from '@pegwell/shared/contract/tunes';
import { api } from '../../../lib/api';
import { libraryKey } from './tune-list';

const tunesPath = (circleId: string) => `/circles/${circleId}/tunes`;

export const tuneKey = (circleId: string, tuneId: string) =>
  [...libraryKey(circleId), 'tune', tuneId] as const;

export const getTune = (circleId: string, tuneId: string, signal?: AbortSignal) =>
  api.get<Tune>(`${tunesPath(circleId)}/${tuneId}`, signal ? { signal } : {});

export const createTune = (circleId: string, tune: CreateTune) => api.post<Tune>(tunesPath(circleId), tune);

/** Sends what changed and nothing else, so that another host's change to another field stays. */
export const updateTune = (circleId: string, tuneId: string, change: UpdateTune) =>
  api.patch<Tune>(`${tunesPath(circleId)}/${tuneId}`, change);

export const removeTune = (circleId: string, tuneId: string) =>
  api.delete(`${tunesPath(circleId)}/${tuneId}`);

export const restoreTune = (circleId: string, tuneId: string) =>
  api.post<Tune>(`${tunesPath(circleId)}/${tuneId}/restore`);
