import type { MailState } from '@pegwell/shared/contract/mail';
import { api } from '../../../lib/api';

export const mailStateKey = ['mail'] as const;

/** Whether this server sends mail. */
export const getMailState = (signal?: AbortSignal) => api.get<MailState>('/mail', signal ? { signal } : {});
