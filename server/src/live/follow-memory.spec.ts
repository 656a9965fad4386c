import { FollowMemory, type Remembered } from './follow-memory';

interface Read extends Remembered {
  readonly said: string;
}

/** A database of one evening, and a memory of it that counts how often it is read. */
function setUp() {
  const stored = { version: 1, goodUntil: Infinity };
  let readings = 0;
  let hold: Promise<void> | null = null;
  let clock = 0;
  const memory = new FollowMemory<Read>(
    async (code) => {
      readings++;
      if (code !== 'CODE') return null;
      const snapshot = { sessionId: 'evening', ...stored, said: `version ${stored.version}` };
      await hold;
      return snapshot;
    },
    () => clock,
  );
  return {
    memory,
    stored,
    readings: () => readings,
    /** Readings take a snapshot and are then held until released. */
    holdReadings: () => {
      let release: () => void = () => undefined;
      hold = new Promise((resolve) => (release = resolve));
      return () => {
        hold = null;
        release();
      };
    },
    passTime: (ms: number) => void (clock += ms),
  };
}

describe('the memory of what phones see', () => {
  it('reads once, and again after it has heard of a change', async () => {
    const { memory, stored, readings } = setUp();
    memory.listens();
    await memory.find('CODE');
    await memory.find('CODE');
    expect(readings()).toBe(1);
    stored.version = 2;
    memory.heard('evening', 2);
    expect((await memory.find('CODE'))?.said).toBe('version 2');
    expect(readings()).toBe(2);
  });

  it('waits for one reading, however many ask at once', async () => {
    const { memory, readings } = setUp();
    await Promise.all(Array.from({ length: 1_000 }, () => memory.find('CODE')));
    expect(readings()).toBe(1);
  });

  it('keeps nothing before it hears, and nothing after it stopped hearing', async () => {
    const { memory, readings } = setUp();
    await memory.find('CODE');
    await memory.find('CODE');
    expect(readings()).toBe(2);
    memory.listens();
    await memory.find('CODE');
    await memory.find('CODE');
    expect(readings()).toBe(3);
    memory.lost();
    await memory.find('CODE');
    await memory.find('CODE');
    expect(readings()).toBe(5);
  });

  it('does not keep a reading during which the line was lost, found again or not', async () => {
    const { memory, stored, holdReadings } = setUp();
    memory.listens();
    const release = holdReadings();
    const asked = memory.find('CODE');
    memory.lost();
    memory.listens();
    stored.version = 2;
    release();
    await asked;
    expect((await memory.find('CODE'))?.said).toBe('version 2');
  });

  it('reads again when a change is heard of while it reads', async () => {
    const { memory, stored, readings, holdReadings } = setUp();
    memory.listens();
    const release = holdReadings();
    const asked = memory.find('CODE');
    stored.version = 2;
    memory.heard('evening', 2);
    release();
    expect((await asked)?.said).toBe('version 2');
    expect(readings()).toBe(2);
  });

  it('never gives an older answer than one it has given', async () => {
    const { memory, stored } = setUp();
    stored.version = 7;
    expect((await memory.find('CODE'))?.version).toBe(7);
    // A replica that lags behind, say.
    stored.version = 6;
    await expect(memory.find('CODE')).rejects.toThrow(/older/);
  });

  it('forgets a code when its time is over', async () => {
    const { memory, stored, passTime } = setUp();
    stored.goodUntil = 1_000;
    memory.listens();
    expect(await memory.find('CODE')).not.toBeNull();
    passTime(1_000);
    expect(await memory.find('CODE')).toBeNull();
  });

  it('knows nothing of other codes', async () => {
    expect(await setUp().memory.find('OTHER')).toBeNull();
  });
});
