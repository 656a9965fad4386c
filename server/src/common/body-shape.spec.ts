import { bodyShapeError } from './body-shape';

const nested = (levels: number) => JSON.parse('['.repeat(levels) + ']'.repeat(levels)) as unknown;

describe('the shape of a body', () => {
  it('is fine for what a schema may judge', () => {
    for (const body of [null, 1, 'text', [], { sets: [{ entries: [{ open: null }] }] }, nested(32)]) {
      expect(bodyShapeError(body)).toBeNull();
    }
  });

  it('ends somewhere', () => {
    expect(bodyShapeError(nested(33))?.message).toMatch(/32 levels/);
    // A megabyte of brackets.
    expect(bodyShapeError(nested(500_000))?.message).toMatch(/32 levels/);
  });

  it('has no __proto__, wherever it stands (JSON.parse makes an ordinary field of it)', () => {
    const body: unknown = JSON.parse('{"sets": [{"__proto__": {"role": "host"}}]}');
    expect(bodyShapeError(body)).toEqual({
      path: 'sets.0.__proto__',
      message: 'There is no field "__proto__" here.',
    });
  });
});
