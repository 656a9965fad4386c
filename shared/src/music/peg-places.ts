import type { InstrumentKind } from './instrument';

/** Where the peg or pegs of a course stand, seen from the front with the head up. */
export interface PegPlace {
  readonly courseIndex: number;
  /** `neck`: a banjo's fifth, on the neck beside the lowest of the other strings. */
  readonly side: 'left' | 'right' | 'neck';
  /** 1 is nearest the nut, counted per side. */
  readonly row: number;
}

/** The pegbox or peghead of a kind. */
export interface Head {
  /** `scroll`: a pegbox with pegs through its cheeks; `plate`: a flat head with machines. */
  readonly shape: 'scroll' | 'plate';
  /** Pegs held by friction turn the way a player sees; geared ones turn either way, as they are built. */
  readonly friction: boolean;
  /** In string order. */
  readonly places: readonly PegPlace[];
}

/** `4L1`: which course, counted from 0, on which side, in which row. */
function places(text: string): readonly PegPlace[] {
  const sides = { L: 'left', R: 'right', N: 'neck' } as const;
  return text.split(' ').map((each) => ({
    courseIndex: Number(each[0]),
    side: sides[each[1] as keyof typeof sides],
    row: Number(each[2]),
  }));
}

/**
 * By kind id, from memory: every violin is built so; other heads as most builders make them. A mountain dulcimer
 * has none here, because its builders place the pegs differently.
 */
const HEADS: Readonly<Record<string, Head>> = {
  fiddle: { shape: 'scroll', friction: true, places: places('0L1 1L2 2R2 3R1') },
  banjo: { shape: 'plate', friction: false, places: places('0N1 1L1 2L2 3R2 4R1') },
  guitar: { shape: 'plate', friction: false, places: places('0L1 1L2 2L3 3R3 4R2 5R1') },
  mandolin: { shape: 'plate', friction: false, places: places('0L1 1L2 2R2 3R1') },
  'tenor-banjo': { shape: 'plate', friction: false, places: places('0L1 1L2 2R2 3R1') },
  bouzouki: { shape: 'plate', friction: false, places: places('0L1 1L2 2R2 3R1') },
  ukulele: { shape: 'plate', friction: false, places: places('0L1 1L2 2R2 3R1') },
  bass: { shape: 'scroll', friction: false, places: places('0L1 1L2 2R2 3R1') },
};

/** Null where it is not known how the head is built. */
export function headOf(kind: InstrumentKind): Head | null {
  return HEADS[kind.id] ?? null;
}

/** A left-handed set-up is the mirror of the other. */
export function mirrored(head: Head): Head {
  const other = { left: 'right', right: 'left', neck: 'neck' } as const;
  return { ...head, places: head.places.map((place) => ({ ...place, side: other[place.side] })) };
}

/**
 * Where to find a peg, in words.
 * @example placeWords(fiddleHead, 1, 1) // 'Left side, upper peg'
 * @throws RangeError for a course that the head has not
 */
export function placeWords(head: Head, courseIndex: number, pegs: number): string {
  const place = head.places.find((each) => each.courseIndex === courseIndex);
  if (!place) throw new RangeError(`This head has no course ${courseIndex}`);
  if (place.side === 'neck') return 'On the neck, at the fifth fret';
  const rows = head.places.filter(({ side }) => side === place.side).length;
  const height = place.row === rows ? 'upper' : place.row === 1 ? 'lower' : 'middle';
  return `${place.side === 'left' ? 'Left' : 'Right'} side, ${height} ${pegs > 1 ? 'pair of pegs' : 'peg'}`;
}

/**
 * Which way the peg turns, as far as the build fixes it: to raise, the top of a violin's peg turns toward the
 * scroll (from memory; every violin is built so). Geared heads turn as they are made: there, sharper or flatter.
 */
export function wayWords({ friction }: Head, direction: 'up' | 'down'): string {
  if (!friction) return direction === 'up' ? 'Turn it sharper' : 'Turn it flatter';
  return `Its top turns toward the ${direction === 'up' ? 'scroll' : 'bridge'}`;
}
