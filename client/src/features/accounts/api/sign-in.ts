import type { Login, Register, SignedIn } from '@pegwell/shared/contract/accounts';
import { api } from '../../../lib/api';

export const signIn = (login: Login) => api.post<SignedIn>('/auth/login', login);

export const register = (account: Register) => api.post<SignedIn>('/auth/register', account);

export const signOut = () => api.post<undefined>('/auth/logout');
