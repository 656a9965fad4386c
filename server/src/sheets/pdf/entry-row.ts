import type { Content, ContentText } from 'pdfmake/interfaces';
import type { SheetEntry, SheetKind } from '../sheet';
import type { Density } from './density';
import { HEAVY, INK, INK_2 } from './ink';
import { tuningText } from './tuning-text';
import { wrapped } from './wrapped';

/** More kinds than this have their tunings in a line of their own under the title. */
const MOST_COLUMNS = 3;
const GAP = 8;

/** Points of the columns behind the title: the key, then one per kind. */
export function columnsOf(room: readonly SheetKind[]): {
  readonly key: number;
  readonly kinds: readonly number[];
} {
  if (room.length > MOST_COLUMNS) return { key: 130, kinds: [] };
  const width = room.length > 2 ? 82 : 92;
  return { key: room.length > 2 ? 88 : 108, kinds: room.map(() => width) };
}

/** A tune or an open place: number, title, key and what every kind is tuned to. */
export function entryRow(entry: SheetEntry, room: readonly SheetKind[], density: Density): Content {
  const { pt } = density;
  const { key, kinds } = columnsOf(room);
  const below = [
    ...(kinds.length === 0 ? [tuningLine(entry, room, density)] : []),
    ...(entry.notes === null ? [] : [small(entry.notes, density)]),
    ...(entry.straightOn ? [small('Straight on into the next.', density)] : []),
  ];
  return {
    columnGap: GAP,
    margin: [0, pt(2), 0, pt(1.4)],
    columns: [
      { width: 14, text: String(entry.number), color: INK_2, fontSize: pt(9), margin: [0, pt(1.6), 0, 0] },
      { width: '*', stack: [titleOf(entry, density), ...below] },
      { width: key, ...wrapped(entry.key), fontSize: pt(9), color: INK, margin: [0, pt(1.6), 0, 0] },
      ...kinds.map((width, index) => {
        const tuning = entry.tunings[index];
        return {
          width,
          margin: [0, pt(1.2), 0, 0] as [number, number, number, number],
          ...(tuning ? tuningText(tuning, pt(9.5)) : { text: '' }),
        };
      }),
    ],
  };
}

function titleOf({ title }: SheetEntry, { pt }: Density): ContentText {
  if (title === null) return { text: 'Open: whoever calls', bold: true, fontSize: pt(11), color: INK_2 };
  return { ...wrapped(title), bold: true, fontSize: pt(11), color: INK, lineHeight: 0.95 };
}

function tuningLine({ tunings }: SheetEntry, room: readonly SheetKind[], { pt }: Density): Content {
  return {
    fontSize: pt(8.5),
    text: tunings.flatMap((tuning, index) => [
      { text: `${index > 0 ? '   ' : ''}${room[index]?.name ?? ''} `, color: INK_2 },
      tuningText(tuning, pt(8.5)),
    ]),
  };
}

function small(text: string, { pt }: Density): Content {
  return { ...wrapped(text), fontSize: pt(8), color: INK_2 };
}

/** The set's title, with the kinds over their columns; it stands again where the set goes on over the page. */
export function setHeading(title: string, room: readonly SheetKind[]): Content {
  const { key, kinds } = columnsOf(room);
  return {
    columnGap: GAP,
    margin: [0, 7, 0, 2],
    columns: [
      { width: '*', ...wrapped(title), font: HEAVY, fontSize: 13, color: INK },
      { width: key, text: '' },
      ...kinds.map((width, index) => ({
        width,
        text: room[index]?.name ?? '',
        fontSize: 8.5,
        color: INK_2,
        margin: [0, 4, 0, 0] as [number, number, number, number],
      })),
    ],
  };
}
