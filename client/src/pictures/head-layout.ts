import type { Head, PegPlace } from '@pegwell/shared/music/peg-places';

/** Of the picture, in px. */
export const WIDTH = 326;
export const HEIGHT = 316;
/** Where a plate ends and the neck begins. */
export const NUT = 284;

const MIDDLE = WIDTH / 2;
/** From the middle of the head to the middle of a peg's head. */
const OUT = 98;

/** The head of one peg. */
export interface Button {
  readonly x: number;
  readonly y: number;
  /** -1 to the left, 1 to the right. */
  readonly out: -1 | 1;
  /** Half its width, and half its height. */
  readonly half: number;
  readonly ry: number;
  /** Where its string is wound, x. */
  readonly post: number;
}

const hasNeckPeg = (head: Head): boolean => head.places.some(({ side }) => side === 'neck');

const overNut = (head: Head): readonly number[] =>
  head.places.filter(({ side }) => side !== 'neck').map((place) => place.courseIndex);

/** The strings of the left pegs lie on the left: a head whose first string is on the right is a mirrored one. */
const isMirrored = (head: Head): boolean =>
  head.places.find(({ side }) => side === 'left')?.courseIndex !== Math.min(...overNut(head));

/** The strings over the nut, in string order from the left; mirrored heads have them the other way round. */
export function stringX(head: Head, courseIndex: number): number {
  const over = overNut(head);
  const at = over.indexOf(courseIndex);
  const index = isMirrored(head) ? over.length - 1 - at : at;
  return MIDDLE + (index - (over.length - 1) / 2) * (60 / (over.length - 1));
}

/** One for each peg of a course: two stand close, a row apart from the next. */
export function buttonsOf(head: Head, place: PegPlace, pegs: number): readonly Button[] {
  if (place.side === 'neck') {
    const out = isMirrored(head) ? 1 : -1;
    return [{ x: MIDDLE + out * 76, y: 266, out, half: 22, ry: 22, post: MIDDLE + out * 36 }];
  }
  const out = place.side === 'left' ? -1 : 1;
  const rows = head.places.filter(({ side }) => side === place.side).length;
  const y = rowY(head, place.side, place.row, rows);
  const doubled = pegs > 1;
  const post = head.shape === 'scroll' ? MIDDLE - out * 20 : MIDDLE + out * 28;
  return Array.from({ length: pegs }, (_, peg) => ({
    x: MIDDLE + out * OUT,
    y: doubled ? y + (peg === 0 ? 21 : -21) : y,
    out,
    half: doubled ? 19 : 27,
    ry: doubled ? 19 : 27,
    post,
  }));
}

function rowY(head: Head, side: 'left' | 'right', row: number, rows: number): number {
  // The pegs of a pegbox stand in turn, so that no peg meets another inside.
  if (head.shape === 'scroll') return 246 - (row - 1) * 100 - (side === 'right' ? 32 : 0);
  const from = NUT - 44 - (hasNeckPeg(head) ? 60 : 0);
  return from - (row - 1) * (rows === 3 ? 78 : hasNeckPeg(head) ? 84 : 100);
}

/** The cheeks of a pegbox, or the plate and the beginning of the neck. */
export function outlineOf(head: Head): string {
  if (head.shape === 'scroll') {
    const [left, right] = [MIDDLE - 37, MIDDLE + 37];
    return `M${left + 6} ${HEIGHT}L${left} 92C${left - 2} 60 ${left + 14} 40 ${MIDDLE} 40C${right - 14} 40 ${right + 2} 60 ${right} 92L${right - 6} ${HEIGHT}`;
  }
  const nut = NUT - (hasNeckPeg(head) ? 60 : 0);
  const [neck, plate] = [34, 52];
  return `M${MIDDLE - neck} ${HEIGHT}V${nut}L${MIDDLE - plate} ${nut - 26}L${MIDDLE - plate - 4} 34Q${MIDDLE - plate} 18 ${MIDDLE - 24} 22Q${MIDDLE} 8 ${MIDDLE + 24} 22Q${MIDDLE + plate} 18 ${MIDDLE + plate + 4} 34L${MIDDLE + plate} ${nut - 26}L${MIDDLE + neck} ${nut}V${HEIGHT}`;
}
