import { lazy } from 'react';
import type { ComponentType } from 'react';

/** A page in a piece of its own, loaded when it is first gone to; pages are named exports. */
export function lazyPage<Name extends string>(load: () => Promise<Record<Name, ComponentType>>, name: Name) {
  return lazy(async () => ({ default: (await load())[name] }));
}
