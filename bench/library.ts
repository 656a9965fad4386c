import { MODES } from '../shared/src/music/mode';
import { Random } from './random';

/** Titles read as titles do; no two words are of one list, so that many are near each other and few alike. */
const FIRST = 'Cold Slack Grey Old Little Long Lost Red Crooked Quiet Broken Sweet High Low Wild Green'.split(
  ' ',
);
const SECOND =
  'Lantern Kettle Tide Owl Weir Ford Heron Mill Ferry Barn Creek Hollow Ridge Apple Rooster Mule Anvil Cider'.split(
    ' ',
  );
const THIRD =
  'Hill Reel Breakdown Waltz Jig Farewell Rag Hornpipe March Special Stomp Polka Two-Step Lament'.split(' ');
const TONICS = ['A', 'D', 'G', 'C', 'E', 'Bb', 'F'];
const FIDDLE = ['AEAE', 'GDAE', 'ADAE', 'GDGD', 'AEAC#', 'GDAE or GDGD', 'AEAE or GDAE'];
const BANJO = ['gDGBD', 'gDGBD capo 2', 'gCGCD', 'gCGCD capo 2', 'gDGCD'];

/**
 * Rows of a table, with its head: a column for every field, notes on half, tunings stated on most and only spoken of
 * in every tenth.
 */
export function libraryRows(count: number, seed: number): string[][] {
  const random = new Random(seed);
  const some = (share: number, text: () => string) => (random.next() < share ? text() : '');
  const rows = Array.from({ length: count }, (_, at) => {
    const title = [
      random.pick(FIRST),
      random.pick(SECOND),
      random.pick(THIRD),
      some(0.6, () => `No. ${at % 97}`),
    ];
    const isSpoken = at % 10 === 0;
    const fiddle = random.pick(FIDDLE);
    return [
      title.filter((word) => word !== '').join(' '),
      random.pick(TONICS),
      random.pick(MODES),
      random.pick(['reel', 'breakdown', 'jig', 'waltz', 'hornpipe']),
      some(0.4, () => 'AABB'),
      some(0.3, () => 'traditional'),
      some(0.5, () => `learnt at session ${random.below(400)}`),
      isSpoken
        ? `fiddle tuned ${fiddle}, crooked`
        : some(0.5, () => `goes well behind number ${random.below(count)}`),
      isSpoken ? '' : some(0.8, () => fiddle),
      some(0.5, () => random.pick(BANJO)),
    ];
  });
  return [
    ['title', 'key', 'mode', 'rhythm', 'parts', 'composer', 'source', 'notes', 'fiddle', 'banjo'],
    ...rows,
  ];
}

const quoted = (cell: string) => (/[",\n]/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell);

export const asCsv = (rows: readonly (readonly string[])[]): string =>
  rows.map((row) => row.map(quoted).join(',')).join('\r\n');

/** The same tunes as ABC, each with eight bars of music to be passed over. */
export const asAbc = (rows: readonly (readonly string[])[]): string =>
  rows
    .slice(1)
    .map(
      ([title = '', key = '', mode = '', rhythm = '', parts, composer, source, notes, fiddle, banjo], at) =>
        [
          `X:${at + 1}`,
          `T:${title}`,
          ...(composer ? [`C:${composer}`] : []),
          ...(source ? [`S:${source}`] : []),
          `R:${rhythm}`,
          ...(parts ? [`P:${parts}`] : []),
          ...(notes ? [`N:${notes}`] : []),
          ...(fiddle ? [`%%pegwell-tuning fiddle ${fiddle}`] : []),
          ...(banjo ? [`%%pegwell-tuning banjo ${banjo}`] : []),
          `K:${key}${mode === 'modal' ? 'mix' : mode}`,
          '|:ABcd efga|ABcd efga|ABcd efga|ABcd efga:|',
          '|:ABcd efga|ABcd efga|ABcd efga|ABcd efga:|',
          '',
        ].join('\n'),
    )
    .join('\n');
