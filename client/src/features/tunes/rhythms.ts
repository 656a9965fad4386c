/** Words offered for a rhythm; any other word will do as well. */
export const RHYTHMS: readonly string[] = [
  'reel',
  'breakdown',
  'jig',
  'slip jig',
  'hornpipe',
  'waltz',
  'march',
  'polka',
  'schottische',
  'strathspey',
  'rag',
  'air',
  'song',
];
