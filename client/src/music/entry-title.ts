import type { ShownEntry } from '@pegwell/shared/contract/sessions';
import { keyWords } from './key-words';

/** What an entry is called: an open place by its key, `A modal tunes`. */
export function entryTitle({ title, key, mode }: Pick<ShownEntry, 'title' | 'key' | 'mode'>): string {
  return title ?? `${keyWords(key, mode)} tunes`;
}
