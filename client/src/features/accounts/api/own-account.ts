import type {
  ChangeEmail,
  ChangePassword,
  DeleteAccount,
  Rename,
  SignIns,
  User,
} from '@pegwell/shared/contract/accounts';
import { api, urlOf } from '../../../lib/api';

export const rename = (body: Rename) => api.patch<User>('/auth/me', body);

export const changePassword = (body: ChangePassword) => api.post<undefined>('/auth/password', body);

export const changeEmail = (body: ChangeEmail) => api.post<undefined>('/auth/email', body);

export const deleteAccount = (body: DeleteAccount) => api.post<undefined>('/auth/me/delete', body);

/** A file that the browser saves. */
export const OWN_DATA = urlOf('/auth/me/data');

export const signInsKey = ['sign-ins'] as const;

export const getSignIns = (signal?: AbortSignal) =>
  api.get<SignIns>('/auth/sign-ins', signal ? { signal } : {});

export const endSignIn = (id: string) => api.delete(`/auth/sign-ins/${id}`);

export const endOtherSignIns = () => api.delete('/auth/sign-ins');
