import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';

/** One thing that a host did, which is taken back as one. */
export interface BoardAction {
  readonly id: string;
  /** As it is said: "Moved Slack Tide". */
  readonly label: string;
  readonly operations: readonly BoardOperation<ShownEntry>[];
}

/** Where what is not saved yet outlives a reload. */
export interface PendingStorage {
  load(): readonly BoardAction[];
  /** @param done ids of actions that need no keeping any more */
  keep(waiting: readonly BoardAction[], done: readonly string[]): void;
}

const isAction = (value: unknown): value is BoardAction =>
  typeof value === 'object' &&
  value !== null &&
  'id' in value &&
  typeof value.id === 'string' &&
  'label' in value &&
  'operations' in value &&
  Array.isArray(value.operations);

/**
 * Kept in the browser, by account and evening. Two tabs share it: each adds its own actions and takes off
 * those that it has saved, so neither forgets the other's.
 */
export function browserStorage(accountId: string, sessionId: string): PendingStorage {
  const key = `pegwell-board-1:${accountId}:${sessionId}`;
  const load = (): readonly BoardAction[] => {
    try {
      const stored: unknown = JSON.parse(localStorage.getItem(key) ?? '[]');
      return Array.isArray(stored) ? stored.filter(isAction) : [];
    } catch {
      // Closed to pages (a private window) or not ours: then nothing is kept over a reload.
      return [];
    }
  };
  return {
    load,
    keep(waiting, done) {
      const own = new Set([...waiting.map(({ id }) => id), ...done]);
      const all = [...load().filter(({ id }) => !own.has(id)), ...waiting];
      try {
        if (all.length === 0) localStorage.removeItem(key);
        else localStorage.setItem(key, JSON.stringify(all));
      } catch {
        // Full or closed: the page still holds it until it is left.
      }
    },
  };
}
