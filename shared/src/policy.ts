import type { Role } from './contract/circles';

/**
 * What a role may do in a circle: one table, read by the server to decide and by the pages to hide.
 * Players read, answer and ask; hosts and cohosts write; only a host changes who is in the circle.
 */
export const policy = {
  'circle.read': ['host', 'cohost', 'player'],
  'circle.change': ['host', 'cohost'],
  'circle.leave': ['host', 'cohost', 'player'],
  'history.read': ['host', 'cohost'],
  'members.read': ['host', 'cohost', 'player'],
  'members.change': ['host'],
  'tunes.read': ['host', 'cohost', 'player'],
  'tunes.change': ['host', 'cohost'],
  'sessions.read': ['host', 'cohost', 'player'],
  'sessions.change': ['host', 'cohost'],
  'live.run': ['host', 'cohost'],
  'record.read': ['host', 'cohost', 'player'],
} as const satisfies Record<string, readonly Role[]>;

export type CircleAction = keyof typeof policy;

export function may(role: Role, action: CircleAction): boolean {
  return (policy[action] as readonly Role[]).includes(role);
}

/** Everything a role may do, for the `can` of a record. */
export function actionsOf(role: Role): CircleAction[] {
  return (Object.keys(policy) as CircleAction[]).filter((action) => may(role, action));
}
