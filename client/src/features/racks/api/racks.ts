import type { CreateRack, PutRack, Rack, Racks } from '@pegwell/shared/contract/racks';
import { api } from '../../../lib/api';

export const racksKey = (sessionId: string) => ['racks', sessionId] as const;

export const getRacks = (sessionId: string, signal?: AbortSignal) =>
  api.get<Racks>(`/sessions/${sessionId}/racks`, signal ? { signal } : {});

export const createRack = (sessionId: string, rack: CreateRack) =>
  api.post<Rack>(`/sessions/${sessionId}/racks`, rack);

export const putRack = (sessionId: string, rackId: string, rack: PutRack) =>
  api.put<Rack>(`/sessions/${sessionId}/racks/${rackId}`, rack);

export const removeRack = (sessionId: string, rackId: string) =>
  api.delete(`/sessions/${sessionId}/racks/${rackId}`);
