import type { SheetPeg } from '../sheet';
import type { Density } from './density';
import { HEAVY, INK, INK_2, ROSIN, ROSIN_INK, TEXT } from './ink';

/** A peg from the front, in a box of 24 x 31: head, shank, collar and pip. The same lines as on every page. */
const PEG = {
  body: 'M9.3 17.5C.5 16.7-.8 3.3 12 3.8 24.8 3.3 23.5 16.7 14.7 17.5ZM9.1 21 10.6 29.5h2.8L14.9 21Z',
  collar: 'M7.5 19h9',
  pip: 'M10.5 2A1.5 1.5 0 0 1 13.5 2 1.5 1.5 0 0 1 10.5 2Z',
};
const BOX = { width: 24, height: 31 };

const PEG_WIDTH = 11.5;
const PEG_HEIGHT = (PEG_WIDTH * BOX.height) / BOX.width;
const SCALE = PEG_WIDTH / BOX.width;
/** From one string's middle to the next, in points; a doubled course takes a peg more. */
const PITCH = 17.5;
const NAME_BASELINE = 6.3;
const PEGS_TOP = 8.5;
const TARGET_BASELINE = PEGS_TOP + PEG_HEIGHT + 7;
const HEIGHT = TARGET_BASELINE + 1.5;

interface Drawing {
  readonly svg: string;
  /** Points. */
  readonly width: number;
}

/**
 * The peg strip: as many pegs as the instrument has, in string order, each under its standing name; those that
 * turn are filled and carry a triangle and the note they end on. Styles are attributes: a PDF reads no sheet.
 */
export function pegStrip(pegs: readonly SheetPeg[], { pt }: Density): Drawing {
  let left = 0;
  const courses = pegs.map((peg) => {
    const width = PITCH + (peg.pegs - 1) * (PEG_WIDTH + 1);
    left += width;
    return course(peg, left - width / 2);
  });
  const size = `width="${pt(left)}" height="${pt(HEIGHT)}" viewBox="0 0 ${left} ${HEIGHT}"`;
  return {
    svg: `<svg xmlns="http://www.w3.org/2000/svg" ${size}>${courses.join('')}</svg>`,
    width: pt(left),
  };
}

function course({ name, pegs, turn }: SheetPeg, middle: number): string {
  const from = middle - (pegs * PEG_WIDTH + (pegs - 1)) / 2;
  const heads = Array.from({ length: pegs }, (_, index) =>
    pegHead(from + index * (PEG_WIDTH + 1), turn !== null),
  );
  const [family, colour] = turn ? [HEAVY, INK] : [TEXT, INK_2];
  return [
    words(name, middle, NAME_BASELINE, family, colour),
    ...heads,
    turn ? target(turn, middle) : '',
  ].join('');
}

function pegHead(left: number, turned: boolean): string {
  const edge = turned ? ROSIN_INK : INK_2;
  const line = (turned ? 0.95 : 0.6) / SCALE;
  const collar = (turned ? 1.5 : 1.05) / SCALE;
  return (
    `<g transform="translate(${left} ${PEGS_TOP}) scale(${SCALE})" stroke="${edge}" stroke-linejoin="round">` +
    `<path d="${PEG.pip}" fill="${edge}" stroke="none"/>` +
    `<path d="${PEG.body}" fill="${turned ? ROSIN : 'none'}" stroke-width="${line}"/>` +
    `<path d="${PEG.collar}" fill="none" stroke-width="${collar}" stroke-linecap="round"/></g>`
  );
}

/** Triangle and note, together under the peg. */
function target({ up, target: note }: NonNullable<SheetPeg['turn']>, middle: number): string {
  const [size, gap, letters] = [5.4, 1.2, note.length * 4.9];
  const left = middle - (size + gap + letters) / 2;
  const [top, bottom] = [TARGET_BASELINE - 5.3, TARGET_BASELINE - 0.3];
  const [peak, foot] = up ? [top, bottom] : [bottom, top];
  const triangle = `<path d="M${left} ${foot}H${left + size}L${left + size / 2} ${peak}Z" fill="${ROSIN_INK}"/>`;
  return triangle + words(note, left + size + gap + letters / 2, TARGET_BASELINE, HEAVY, ROSIN_INK);
}

function words(text: string, x: number, y: number, family: string, colour: string): string {
  return `<text x="${x}" y="${y}" text-anchor="middle" font-family="${family}" font-size="8" fill="${colour}">${text}</text>`;
}
