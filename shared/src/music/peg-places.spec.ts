import { describe, expect, it } from 'vitest';
import { BUILT_IN_KINDS, builtInKind } from './instrument';
import { headOf, mirrored, placeWords, wayWords } from './peg-places';

const found = (kindId: string) => {
  const kind = builtInKind(kindId)!;
  return { kind, head: headOf(kind)! };
};
const whereOf = (kindId: string) => {
  const { kind, head } = found(kindId);
  return kind.courses.map((course, index) => placeWords(head, index, course.pegs));
};

describe('where pegs stand', () => {
  // From memory; every violin is built so: G left lower, D left upper, A right upper, E right lower.
  it('is as on every violin', () => {
    expect(whereOf('fiddle')).toEqual([
      'Left side, lower peg',
      'Left side, upper peg',
      'Right side, upper peg',
      'Right side, lower peg',
    ]);
  });

  // From memory: left 4th and 3rd, the 4th nearer the nut; right 1st and 2nd, the 1st nearer; the 5th at fret 5.
  it('is as on most banjos, the fifth on the neck', () => {
    expect(whereOf('banjo')).toEqual([
      'On the neck, at the fifth fret',
      'Left side, lower peg',
      'Left side, upper peg',
      'Right side, upper peg',
      'Right side, lower peg',
    ]);
  });

  // From memory: 3 + 3, 6 5 4 from the nut up on the left, 1 2 3 on the right.
  it('is as on a guitar with three a side', () => {
    expect(whereOf('guitar').slice(0, 3)).toEqual([
      'Left side, lower peg',
      'Left side, middle peg',
      'Left side, upper peg',
    ]);
    expect(whereOf('guitar').slice(3).reverse()).toEqual([
      'Right side, lower peg',
      'Right side, middle peg',
      'Right side, upper peg',
    ]);
  });

  it('speaks of both pegs of a course, and is silent where builders differ', () => {
    expect(whereOf('mandolin')[0]).toBe('Left side, lower pair of pegs');
    expect(headOf(builtInKind('dulcimer')!)).toBeNull();
  });

  it('has one place for each course, and two places are never the same', () => {
    for (const kind of BUILT_IN_KINDS) {
      const head = headOf(kind);
      if (!head) continue;
      expect(head.places.map(({ courseIndex }) => courseIndex)).toEqual(
        kind.courses.map((_, index) => index),
      );
      expect(new Set(head.places.map(({ side, row }) => `${side} ${row}`)).size).toBe(kind.courses.length);
    }
  });

  it('is the other way round for the left hand', () => {
    const { head } = found('fiddle');
    expect(placeWords(mirrored(head), 0, 1)).toBe('Right side, lower peg');
    expect(mirrored(mirrored(head))).toEqual(head);
  });
});

describe('which way a peg turns', () => {
  // From memory: to raise, the top of the peg turns toward the scroll.
  it('is said where the build fixes it, else only sharper or flatter', () => {
    expect(wayWords(found('fiddle').head, 'up')).toBe('Its top turns toward the scroll');
    expect(wayWords(found('fiddle').head, 'down')).toBe('Its top turns toward the bridge');
    expect(wayWords(found('guitar').head, 'up')).toBe('Turn it sharper');
  });
});
