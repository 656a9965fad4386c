import type { Column, Content, ContentText } from 'pdfmake/interfaces';
import type { SheetMove, SheetPlace } from '../sheet';
import type { Density } from './density';
import { BREAK, HEAVY, INK, INK_2, ROSIN_INK, ROSIN_PAPER } from './ink';
import { pegStrip } from './peg-strip';
import { tuningText } from './tuning-text';

/** Points from the left edge of the band to what stands in it. */
const INDENT = 18;
const GAP = 10;
const STRIP_GAP = 6;

/** What is done before a tune: per kind the strip, the words, and what to look out for. */
export function retuneBand(place: SheetPlace, width: number, density: Density): Content {
  const { pt } = density;
  const turning = place.moves.filter(({ strip }) => strip !== null);
  const capos = place.moves.filter(({ strip }) => strip === null);
  const rows: Content[] = [];
  for (let index = 0; index < turning.length; index += 2) {
    rows.push(sideBySide(turning.slice(index, index + 2), width - INDENT, density));
  }
  if (capos.length > 0) rows.push(capoLine(capos, density));
  const stack = [...placeLabel(place, density), ...rows];
  return {
    table: { widths: [width], body: [[{ stack, fillColor: ROSIN_PAPER }]] },
    layout: {
      hLineWidth: () => 0,
      vLineWidth: () => 0,
      paddingLeft: () => 0,
      paddingRight: () => 0,
      paddingTop: () => pt(turning.length > 0 ? 2.5 : 1.5),
      paddingBottom: () => pt(turning.length > 0 ? 1.5 : 2),
    },
  };
}

function placeLabel({ when }: SheetPlace, { pt }: Density): readonly Content[] {
  if (when === 'between') return [];
  const text = when === 'in the break' ? 'In the break' : 'Before the first tune';
  return [{ text, font: HEAVY, fontSize: pt(8.5), color: ROSIN_INK, margin: [INDENT, 0, 0, 1] }];
}

/** Words get the same width, whatever the strips take. */
function sideBySide(moves: readonly SheetMove[], width: number, density: Density): Content {
  const strips = moves.map(({ strip }) => pegStrip(strip ?? [], density));
  const taken = strips.reduce((sum, strip) => sum + strip.width + STRIP_GAP, (moves.length - 1) * GAP);
  const words = (width - taken) / moves.length;
  return {
    columns: moves.flatMap((move, index): Column[] => {
      const strip = strips[index];
      if (!strip) return [];
      return [
        { width: index > 0 ? GAP : 0, text: '' },
        { width: strip.width + STRIP_GAP, stack: [{ svg: strip.svg, width: strip.width }] },
        { width: words, stack: wordsOf(move, density) },
      ];
    }),
    margin: [INDENT, 0, 0, 0],
  };
}

function wordsOf({ who, to, first, words, last, cautions }: SheetMove, density: Density): Content[] {
  const { pt, labels } = density;
  const label: ContentText[] = [
    { text: `${who} to `, font: HEAVY, fontSize: pt(8.5), color: ROSIN_INK },
    tuningText(to, pt(8.5)),
  ];
  const quiet = (text: string): ContentText => ({ text, fontSize: pt(8), color: INK_2 });
  const what: ContentText[] = [
    ...(first === '' ? [] : [quiet(`${first}; `)]),
    { text: words, bold: true, fontSize: pt(9.5), color: INK },
    quiet(`; ${last}`),
  ];
  const lines: ContentText[] =
    labels === 'above' ? [{ text: label }, { text: what }] : [{ text: [...label, { text: '  ' }, ...what] }];
  return [
    ...lines.map((line) => ({ ...line, lineHeight: 0.93 })),
    ...cautions.map((text) => ({ text, fontSize: pt(8), bold: true, color: BREAK, lineHeight: 0.93 })),
  ];
}

/** A capo is moved and no peg turned: one quiet line for all kinds. */
function capoLine(moves: readonly SheetMove[], { pt }: Density): Content {
  return {
    margin: [INDENT, 0, 0, 0],
    fontSize: pt(8.5),
    text: moves.flatMap(({ who, words }, index) => [
      { text: `${index > 0 ? '   ' : ''}${who}: `, font: HEAVY, color: ROSIN_INK },
      { text: words, bold: true, color: INK },
    ]),
  };
}
