import { ImportThread } from './import-thread';

class Hurried extends ImportThread {
  protected override readonly longest = 1;
}

describe('ImportThread', () => {
  const rows = (count: number) =>
    Buffer.from(`title,key\n${Array.from({ length: count }, (_, n) => `Tune ${n},A`).join('\n')}`);

  it('reads a large file in a thread as a small one here', async () => {
    const thread = new ImportThread();
    const large = await thread.read({ format: 'csv', bytes: rows(10_000) });
    expect(large).toMatchObject({ ok: true, value: { format: 'csv', encoding: 'utf-8', problems: [] } });
    const small = await thread.read({ format: 'csv', bytes: rows(10) });
    if (!large.ok || !small.ok) throw new Error('Both can be read.');
    expect(large.value.tunes.slice(0, 10)).toEqual(small.value.tunes);
    const plan = await thread.plan(large.value.tunes, [], []);
    expect(plan.tunes.filter(({ action }) => action === 'create')).toHaveLength(10_000);
    await thread.onApplicationShutdown();
  });

  it('gives up on a file that takes too long, and reads the next', async () => {
    const thread = new Hurried();
    for (let time = 0; time < 2; time++) {
      expect(await thread.read({ format: 'csv', bytes: rows(100_000) })).toEqual({
        ok: false,
        reason: 'This file takes too long to read: it is no list of tunes, or has to be cut in parts.',
      });
    }
    expect(await thread.read({ format: 'csv', bytes: rows(3) })).toMatchObject({ ok: true });
    await thread.onApplicationShutdown();
  });
});
