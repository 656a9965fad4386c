/** Who sends it. */
export const CALLERS = ['host', 'cohost', 'player', 'elsewhere', 'nobody'] as const;
export type CallerName = (typeof CALLERS)[number];

/**
 * A request before it meets a world: ids stand as `@tune:3`, which is the fourth tune of whatever circle there is
 * when it is sent. Plain data, so that what failed can be read and sent again.
 */
export interface Recipe {
  readonly operation: string;
  readonly method: string;
  readonly path: string;
  readonly caller: CallerName;
  readonly query: readonly (readonly [string, string])[];
  readonly headers: Readonly<Record<string, string>>;
  readonly body:
    | { readonly json: unknown }
    | { readonly raw: string }
    | { readonly file: string; readonly name: string }
    | null;
}
