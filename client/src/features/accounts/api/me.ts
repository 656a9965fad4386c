import type { Me } from '@pegwell/shared/contract/accounts';
import { api } from '../../../lib/api';
import { ProblemError } from '../../../lib/problem';

export const meKey = ['me'] as const;

/** Who is signed in and their circles; null when nobody is. */
export async function getMe(signal?: AbortSignal): Promise<Me | null> {
  try {
    return await api.get<Me>('/auth/me', signal ? { signal } : {});
  } catch (error) {
    if (error instanceof ProblemError && error.status === 401) return null;
    throw error;
  }
}
