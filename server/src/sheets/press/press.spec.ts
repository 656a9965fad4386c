import type { Sheet } from '../sheet';
import { Press } from './press';

const tuning = { letters: 'GDAE', capo: 0, standing: 'stated' } as const;
const SHEET: Sheet = {
  title: 'Anywhere',
  when: 'Thursday 14 January 2027, 19:30',
  place: null,
  notes: null,
  room: [{ name: 'Fiddle', players: '1 fiddle' }],
  referenceA: '440',
  summary: '40 tunes',
  follow: { url: 'https://tunes.example.org/f/ABCDEFGH', code: 'ABCDEFGH' },
  arrivals: [{ kind: 'Fiddle', tuning, free: false }],
  sets: [
    {
      title: 'First set',
      entries: Array.from({ length: 40 }, (_, index) => ({
        number: index + 1,
        title: `Tune ${index + 1}`,
        key: 'D · reel',
        tunings: [tuning],
        notes: null,
        straightOn: false,
        before: null,
      })),
    },
  ],
  turns: false,
  legend: [],
};

describe('the press', () => {
  const press = new Press();
  afterAll(() => press.onApplicationShutdown());

  it('draws beside the event loop, and leaves it free', async () => {
    await press.draw(SHEET, 'a4');
    let ticks = 0;
    const timer = setInterval(() => ticks++, 5);
    const [one, other] = await Promise.all([press.draw(SHEET, 'a4'), press.draw(SHEET, 'letter')]);
    clearInterval(timer);
    expect(one.subarray(0, 5).toString()).toBe('%PDF-');
    expect(other.subarray(0, 5).toString()).toBe('%PDF-');
    expect(ticks).toBeGreaterThan(2);
  });
});
