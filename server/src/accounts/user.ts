import type { User } from '@pegwell/shared/contract/accounts';
import type { AccountRow } from './accounts.repository';

export function toUser({ id, email, displayName, confirmedAt }: AccountRow): User {
  return { id, email, displayName, confirmed: confirmedAt !== null };
}
