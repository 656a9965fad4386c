import type { Confirmed, Forgot, Reset } from '@pegwell/shared/contract/accounts';
import { api } from '../../../lib/api';

export const forgot = (body: Forgot) => api.post<undefined>('/auth/forgot', body);

export const resetPassword = (body: Reset) => api.post<undefined>('/auth/reset', body);

export const confirmAddress = (token: string) => api.post<Confirmed>('/auth/confirm', { token });

export const confirmAgain = () => api.post<undefined>('/auth/confirm/again');
