import { DrizzleQueryError } from 'drizzle-orm/errors';
import { errorWithoutValues } from './logging';

describe('an error in the log', () => {
  it('tells the statement that failed and why, and none of its values', () => {
    const refused = Object.assign(new Error('duplicate key value'), {
      code: '23505',
      detail: 'Key (email_key)=(ada@example.org) already exists.',
    });
    const error = new DrizzleQueryError(
      'insert into accounts values ($1, $2)',
      ['ada@example.org', 'a letter\n    at home'],
      refused,
    );
    const logged = errorWithoutValues(error);
    expect(logged).toMatchObject({
      message: 'Failed query: insert into accounts values ($1, $2)',
      cause: { message: 'duplicate key value', code: '23505' },
    });
    expect(logged?.stack).toContain('logging.spec');
    expect(JSON.stringify(logged)).not.toMatch(/ada@|letter/);
  });

  it('ends, also where causes go round', () => {
    const one: Error = new Error('one');
    one.cause = new Error('two', { cause: one });
    expect(JSON.stringify(errorWithoutValues(one)).length).toBeLessThan(20_000);
  });
});
