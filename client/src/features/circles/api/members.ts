import type { AddMember, CircleMember, Role } from '@pegwell/shared/contract/circles';
import { api } from '../../../lib/api';

interface Members {
  readonly items: readonly CircleMember[];
}

export const membersKey = (circleId: string) => ['circle', circleId, 'members'] as const;

export const getMembers = (circleId: string, signal?: AbortSignal) =>
  api.get<Members>(`/circles/${circleId}/members`, signal ? { signal } : {});

/** The account must exist: 422 at `email` where it does not, 409 where it is a member already. */
export const addMember = (circleId: string, member: AddMember) =>
  api.post<CircleMember>(`/circles/${circleId}/members`, member);

/** 422 where nobody would be left as a host; so is taking out. */
export const changeRole = (circleId: string, accountId: string, role: Role) =>
  api.patch<CircleMember>(`/circles/${circleId}/members/${accountId}`, { role });

export const removeMember = (circleId: string, accountId: string) =>
  api.delete(`/circles/${circleId}/members/${accountId}`);

export const leaveCircle = (circleId: string) => api.delete(`/circles/${circleId}/membership`);
