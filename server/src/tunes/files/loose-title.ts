import { titleKey } from '@pegwell/shared/tunes/title-key';

const BRACKETS = /[([{][^)\]}]*[)\]}]?/g;
const ARTICLE = /^(?:the|a|an|le|la|les)\s+|,\s*(?:the|a|an|le|la|les)$/g;
/** A number or a letter alone: what tells `Polska No. 2` from `Polska No. 3`, and `Reel in A` from `Reel in D`. */
const TELLING = /(?<![\p{L}\p{N}-])(?:\p{N}+|\p{L})(?![\p{L}\p{N}-])/gu;

export interface LooseTitle {
  /** Letters and numbers alone, without articles and what stands in brackets. */
  readonly letters: string;
  /** Numbers and single letters, which have to be the same in titles that are alike. */
  readonly telling: string;
}

/**
 * What is left of a title when one asks whether another is likely the same tune.
 * @example looseTitle('Dusty Miller, The (A part)') // { letters: 'dustymiller', telling: '' }
 */
export function looseTitle(title: string): LooseTitle {
  const key = titleKey(title);
  const bare = key.replace(BRACKETS, ' ').trim().replace(ARTICLE, '');
  const said = /[\p{L}\p{N}]/u.test(bare) ? bare : key;
  const words = said.replaceAll('&', ' and ');
  return {
    letters: words.replace(/[^\p{L}\p{N}]+/gu, ''),
    telling: (words.match(TELLING) ?? []).join(' '),
  };
}
