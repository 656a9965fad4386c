import type { Content, TDocumentDefinitions } from 'pdfmake/interfaces';
import type { Sheet, SheetSet } from '../sheet';
import type { Density } from './density';
import { entryRow, setHeading } from './entry-row';
import { HEAVY, INK, INK_2, LINE, TEXT } from './ink';
import { retuneBand } from './retune-band';
import { tuningText } from './tuning-text';
import { wrapped } from './wrapped';

import type { Paper } from '@pegwell/shared/contract/sheets';

/** Points, 72 an inch. A4: ISO 216, 210 x 297 mm. */
const PAPERS = { a4: { width: 595.28, height: 841.89 }, letter: { width: 612, height: 792 } } as const;
const SIDE = 38;
const TOP = 32;
/** Room for four lines of small print: what does not fit in a foot is left out without a word. */
const FOOT = 48;

/** The room that the code takes at most, its quiet zone beside it; a module is 2 to 3 points wide. */
const CODE_SIZE = 100;

const CAUTION =
  'Turn slowly, one string at a time, pushing the peg in a little; come up to pitch from below, and keep your face ' +
  'out of line with the string. Cautions are common practice: the string maker’s advice and a luthier come first.';

/** @param onPages is told how many pages it takes, once it is laid out */
export function sheetDocument(
  sheet: Sheet,
  paper: Paper,
  density: Density,
  onPages: (pages: number) => void,
): TDocumentDefinitions {
  const size = PAPERS[paper];
  const width = size.width - 2 * SIDE;
  return {
    pageSize: size,
    pageMargins: [SIDE, TOP, SIDE, FOOT],
    language: 'en',
    displayTitle: true,
    info: { title: sheet.title, creator: 'Pegwell', producer: 'Pegwell' },
    defaultStyle: { font: TEXT, fontSize: 9.5, color: INK },
    content: [
      header(sheet),
      ...sheet.sets.map((set) => setTable(set, sheet, width, density)),
      ...(sheet.sets.length === 0 ? [nothing()] : []),
      ...legend(sheet),
    ],
    footer: (page, pages) => {
      onPages(pages);
      return foot(sheet, page, pages);
    },
  };
}

function header(sheet: Sheet): Content {
  const { title, when, place, room, referenceA, summary, notes, follow } = sheet;
  const long = title.length > 44;
  const facts = [room.map(({ players }) => players).join(', '), `A = ${referenceA} Hz`, summary];
  return {
    columnGap: 16,
    columns: [
      {
        width: '*',
        stack: [
          {
            text: title,
            font: HEAVY,
            fontSize: long ? 17 : 24,
            color: INK,
            lineHeight: 0.95,
            margin: [0, 0, 0, 3],
          },
          { ...wrapped([when, ...(place === null ? [] : [place])].join(' · ')), fontSize: 10.5, color: INK },
          { text: facts.filter(Boolean).join(' · '), fontSize: 9.5, color: INK_2, margin: [0, 1, 0, 0] },
          ...arrivals(sheet),
          ...(notes === null
            ? []
            : [{ ...wrapped(notes), fontSize: 9.5, margin: [0, 3, 0, 0] } satisfies Content]),
        ],
      },
      {
        width: 'auto',
        stack: [
          { qr: follow.url, fit: CODE_SIZE, eccLevel: 'M', foreground: INK, alignment: 'right' },
          {
            alignment: 'right',
            // The code needs four modules of white around it (ISO/IEC 18004).
            margin: [0, 9, 0, 0],
            text: [
              { text: 'scan to follow  ', fontSize: 8, color: INK_2 },
              { text: follow.code, font: HEAVY, fontSize: 10, characterSpacing: 1 },
            ],
          },
        ],
      },
    ],
  };
}

function arrivals({ arrivals, sets }: Sheet): readonly Content[] {
  if (arrivals.length === 0 || sets.length === 0) return [];
  return [
    {
      margin: [0, 4, 0, 0],
      fontSize: 9.5,
      text: [
        { text: 'Arrive tuned to', font: HEAVY },
        ...arrivals.flatMap(({ kind, tuning, free }) => [
          { text: `    ${kind} `, color: INK_2 },
          ...(tuning ? [tuningText(tuning, 10)] : [{ text: 'what you like' }]),
          ...(free && tuning ? [{ text: ' (the first tune)', color: INK_2 }] : []),
        ]),
      ],
    },
  ];
}

function setTable({ title, entries }: SheetSet, sheet: Sheet, width: number, density: Density): Content {
  return {
    table: {
      headerRows: 1,
      keepWithHeaderRows: 1,
      dontBreakRows: true,
      widths: [width],
      body: [
        [setHeading(title, sheet.room)],
        ...entries.map((entry) => [
          {
            stack: [
              ...(entry.before ? [retuneBand(entry.before, width, density)] : []),
              entryRow(entry, sheet.room, density),
            ],
          },
        ]),
      ],
    },
    layout: {
      hLineWidth: (index) => (index === 0 ? 0 : 0.5),
      hLineColor: () => LINE,
      vLineWidth: () => 0,
      paddingLeft: () => 0,
      paddingRight: () => 0,
      paddingTop: () => 0,
      paddingBottom: () => 0,
    },
  };
}

function nothing(): Content {
  return { text: 'Nothing is planned yet.', fontSize: 12, color: INK_2, margin: [0, 24, 0, 0] };
}

function legend({ legend }: Sheet): readonly Content[] {
  if (legend.length === 0) return [];
  return [{ text: legend.join('    '), fontSize: 8, color: INK_2, margin: [0, 5, 0, 0] }];
}

function foot({ turns, title }: Sheet, page: number, pages: number): Content {
  const short = [...title].length > 40 ? `${[...title].slice(0, 39).join('').trimEnd()}…` : title;
  return {
    margin: [SIDE, 8, SIDE, 0],
    columnGap: 16,
    columns: [
      { width: '*', text: turns ? CAUTION : '', fontSize: 7.5, color: INK_2, lineHeight: 0.9 },
      {
        width: 150,
        text: pages > 1 ? `${short} · ${page} of ${pages}` : '',
        fontSize: 7.5,
        color: INK_2,
        alignment: 'right',
      },
    ],
  };
}
