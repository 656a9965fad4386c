import { expect, it } from 'vitest';
import { newId } from './new-id';

it('makes UUIDs of version 4 with the variant bits of RFC 9562, section 5.4', () => {
  const ids = Array.from({ length: 200 }, newId);
  for (const id of ids)
    expect(id).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
  expect(new Set(ids).size).toBe(ids.length);
});
