import type { ContentText } from 'pdfmake/interfaces';

/** Letters in a row that fit into the narrowest column of titles, however wide they are. */
const LONGEST_WORD = 20;

/** Text that people wrote: broken between words, and inside them only where a word would run off the paper. */
export function wrapped(text: string): Pick<ContentText, 'text' | 'wordBreak'> {
  const runsOff = text.split(/\s/).some((word) => word.length > LONGEST_WORD);
  return runsOff ? { text, wordBreak: 'break-all' } : { text };
}
