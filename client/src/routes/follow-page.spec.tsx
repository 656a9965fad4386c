import type { Follow } from '@pegwell/shared/contract/live';
import { act, screen, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { follow, tune } from '../features/live/follow-fixtures';
import { mockApi, type Answer, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';

const CODE = 'QGQE34ES';
const unknown: Answer = {
  status: 404,
  body: { status: 404, code: 'not-found', detail: 'No evening has this code.' },
};

/** The page on a phone of somebody who plays this. */
function open(answer: Follow | Answers[string], instrument: string | null = 'fiddle', path = `/f/${CODE}`) {
  if (instrument) localStorage.setItem('pegwell-instrument', instrument);
  const asked = mockApi({
    [`GET /api/follow/${CODE}`]:
      typeof answer === 'function' ? answer : () => ({ status: 200, body: answer }),
  });
  renderApp(path);
  return asked;
}

const region = async (name: string) => within(await screen.findByRole('region', { name }));
const playing = (parts: Partial<Follow> = {}) => follow(parts);
/** Cluck Old Hen is now, and the fiddle goes from ADAE to AEAE. */
const tuning = (parts: Partial<Follow> = {}) =>
  follow({
    now: { ...tune(6, 'Cluck Old Hen', 'AEAE', 'ADAE', { mode: 'modal' }), phase: 'tuning' },
    next: tune(7, 'June Apple', 'AEAE'),
    later: [tune(8, 'Lantern Hill', 'AEAC#', 'AEAE', { set: 'Second set' })],
    retuneIn: 2,
    ...parts,
  });

describe('the phone on the music stand', () => {
  it('asks once what one plays, those of the room first, and remembers it', async () => {
    const guitar = (position: number) =>
      tune(position, `Tune ${position}`, 'EADGBE', 'EADGBE', { kind: 'guitar' });
    const asked = open(
      (_, url) => ({
        status: 200,
        body:
          url.searchParams.get('kind') === 'guitar'
            ? playing({ kind: 'guitar', now: { ...guitar(5), phase: 'playing' }, next: guitar(6), later: [] })
            : playing(),
      }),
      null,
    );
    expect(await screen.findByRole('heading', { level: 1, name: 'What do you play?' })).toBeTruthy();
    const names = screen.getAllByRole('button').map((button) => button.textContent);
    expect(names.slice(0, 4)).toEqual(['Fiddle', 'Banjo', 'Guitar', 'Mandolin']);
    await userEvent.click(screen.getByRole('button', { name: 'Guitar' }));
    expect(await screen.findByRole('heading', { level: 1, name: 'Tune 5' })).toBeTruthy();
    expect(localStorage.getItem('pegwell-instrument')).toBe('guitar');
    expect(asked.length).toBeGreaterThan(1);
    await userEvent.click(screen.getByRole('button', { name: 'Guitar, change' }));
    await userEvent.click(screen.getByRole('button', { name: 'Fiddle' }));
    expect(localStorage.getItem('pegwell-instrument')).toBe('fiddle');
  });

  it('shows the tune, its letters, and that there is nothing to do', async () => {
    open(playing());
    const now = await region('Now');
    expect(now.getByText('Playing now')).toBeTruthy();
    expect(now.getByRole('heading', { level: 1, name: 'Millrace Waltz' })).toBeTruthy();
    expect(now.getByText('D · waltz')).toBeTruthy();
    expect(now.getByRole('img', { name: 'Fiddle in A D A E' })).toBeTruthy();
    expect(now.getByText('Your fiddle is set. Stay as you are.')).toBeTruthy();
    expect(screen.getByText('Tune 5 of 16 · First set')).toBeTruthy();
    expect(screen.getByText('A = 440 Hz')).toBeTruthy();
  });

  it('shows what changes next, peg by peg, in the words used everywhere', async () => {
    open(playing());
    const next = await region('Next');
    expect(next.getByText('Next · retune 1 peg')).toBeTruthy();
    expect(next.getByRole('heading', { name: 'Cluck Old Hen, A modal' })).toBeTruthy();
    // look.md: "One function words every turn everywhere".
    expect(next.getByText('D peg (3rd): up a whole step, from D to E')).toBeTruthy();
    const later = await region('Later');
    expect(later.getAllByRole('listitem').map((item) => item.textContent)).toEqual([
      'June AppleA mixolydian · stay',
      'Lantern HillA · 1 peg',
    ]);
  });

  it('says in how many tunes it will be, and for which', async () => {
    open(
      playing({
        next: tune(6, 'Old Ferry Road', 'ADAE'),
        later: [tune(7, 'June Apple', 'AEAE', 'ADAE')],
        retuneIn: 2,
      }),
    );
    const next = await region('Next');
    expect(next.getByText('Next · stay as you are')).toBeTruthy();
    expect(next.getByText('Stay as you are for 2 tunes, this one included.')).toBeTruthy();
    expect(next.getByText('Then retune 1 peg')).toBeTruthy();
    expect(next.getByRole('heading', { name: 'for June Apple, A' })).toBeTruthy();
    expect(next.getByText('D peg (3rd): up a whole step, from D to E')).toBeTruthy();
  });

  it('tells what to turn now in a safe order, with what to look out for', async () => {
    open(
      tuning({
        now: { ...tune(6, 'Sandy Boys', 'AEAE', 'GDAF', { mode: 'modal' }), phase: 'tuning' },
      }),
    );
    const now = await region('Now');
    expect(now.getByText('Coming now')).toBeTruthy();
    expect(now.getByText('Retune 3 pegs now')).toBeTruthy();
    // score.md, "Words of safety": those that come down, then those that go up, then the bridge and a check.
    expect(now.getAllByRole('listitem').map((item) => item.textContent)).toEqual([
      'E peg (1st): down a half step, from F to E. A little under, then up to pitch.',
      'G peg (4th): up a whole step, from G to A. Slowly, from below.',
      'D peg (3rd): up a whole step, from D to E. Slowly, from below.',
      'See that the bridge stands upright, and check all strings again: one moves the others.',
      'G peg (4th): a whole step above its standard pitch. Bring it up slowly, from below.',
      'D peg (3rd): a whole step above its standard pitch. Bring it up slowly, from below.',
    ]);
    expect(now.getByText(/The string maker's advice and a luthier come first/)).toBeTruthy();
    expect(now.getByText(/never several slack at once/)).toBeTruthy();
  });

  it('shows a turn beyond the limits only to a player who says to go on', async () => {
    // score.md: a plain top string is refused above +2; G5 is a fiddle's E raised by 3.
    const now = tune(6, 'High Water', 'G3 D4 A4 G5', 'GDAE');
    open(tuning({ now: { ...now, retune: { ...now.retune!, gentler: 'GDAE' }, phase: 'tuning' } }));
    const section = await region('Now');
    expect(section.getByText(/may well break and hurt/)).toBeTruthy();
    expect(section.getByText('This tune is also played in GDAE, which raises less.')).toBeTruthy();
    expect(section.queryByText(/E peg \(1st\): up/)).toBeNull();
    await userEvent.click(section.getByRole('button', { name: 'I know my strings. Show the turns' }));
    expect(section.getByText(/E peg \(1st\): up 1½ steps, from E to G/)).toBeTruthy();
    expect(section.getByText(/may well break and hurt/)).toBeTruthy();
  });

  it('lets those with nothing to turn wait, and those who are late look again', async () => {
    let answer = tuning({ now: { ...tune(6, 'Cluck Old Hen', 'AEAE'), phase: 'tuning' } });
    open(() => ({ status: 200, body: answer }));
    expect(
      await screen.findByText('Your fiddle is set. Stay as you are while the others tune.'),
    ).toBeTruthy();
    answer = { ...tuning(), version: 2 };
    answer = { ...answer, now: { ...answer.now!, phase: 'playing' } };
    expect(await screen.findByText('The room is in tune.', undefined, { timeout: 3_000 })).toBeTruthy();
    expect(screen.getByText('Not there yet? What to turn')).toBeTruthy();
  });

  it('gives a kind for which the room does not wait its turns while the others play', async () => {
    const now = tune(6, 'Cluck Old Hen', 'DADGAD', 'EADGBE', { kind: 'guitar' });
    open(playing({ kind: 'guitar', now: { ...now, phase: 'playing' }, next: null, later: [] }), 'guitar');
    expect(await screen.findByText('Retune 3 pegs now')).toBeTruthy();
  });

  it('names an open place by what may be called there', async () => {
    open(playing({ now: { ...tune(5, null, 'ADAE'), phase: 'playing' } }));
    expect(await screen.findByRole('heading', { level: 1, name: 'A tunes' })).toBeTruthy();
    expect(screen.getByText('open place · 40 min · whoever calls')).toBeTruthy();
  });

  it('asks nothing of an instrument for which nothing is stated', async () => {
    const nothing = { tuning: null, capo: null, pitches: null };
    open(playing({ now: { ...tune(5, 'Millrace Waltz', 'GDAE', 'GDAE', nothing), phase: 'playing' } }));
    expect(await screen.findByText('Your fiddle is set. Stay as you are.')).toBeTruthy();
    expect(screen.queryByRole('img', { name: /^Fiddle in/ })).toBeNull();
  });

  it('waits for the start with the first tune’s retune from what people arrive in', async () => {
    open(
      playing({
        status: 'planned',
        now: null,
        next: tune(1, 'June Apple', 'AEAE', 'GDAE'),
        later: [],
        retuneIn: 0,
      }),
    );
    expect(await screen.findByRole('heading', { level: 1, name: 'Thursday at the Old Mill' })).toBeTruthy();
    expect(screen.getByText(/Not begun yet. Thursday 14 January 2027, 19:30/)).toBeTruthy();
    const first = await region('First');
    expect(first.getByText('First tune · retune 2 pegs')).toBeTruthy();
    expect(first.getByText('G peg (4th): up a whole step, from G to A')).toBeTruthy();
  });

  it('says good night when it is over', async () => {
    open(playing({ status: 'finished', now: null, next: null, later: [], retuneIn: null }));
    expect(await screen.findByText(/Good night/)).toBeTruthy();
  });

  it('says that no evening has the code, and takes another', async () => {
    open(() => unknown);
    expect(await screen.findByText('No evening has this code.')).toBeTruthy();
    const field = screen.getByRole('textbox', { name: 'Code of the evening' });
    expect((field as HTMLInputElement).value).toBe(CODE);
  });

  it('begins in lamp light and switches to day', async () => {
    open(playing());
    await userEvent.click(await screen.findByRole('button', { name: 'Day light' }));
    expect(document.documentElement.dataset['light']).toBe('day');
    expect(localStorage.getItem('pegwell-light-phone')).toBe('day');
  });

  describe('over time', () => {
    beforeEach(() => void vi.useFakeTimers({ now: Date.parse('2027-01-14T20:00:00Z') }));
    afterEach(() => void vi.useRealTimers());
    const pass = (ms: number) => act(() => vi.advanceTimersByTimeAsync(ms));

    it('says how old what it shows is, and keeps it, while there is no signal', async () => {
      let reachable = true;
      open(() => (reachable ? { status: 200, body: playing() } : { status: 503 }));
      await pass(100);
      expect(screen.getByText('with the host')).toBeTruthy();
      reachable = false;
      await pass(40_000);
      expect(screen.getByText('Last heard 40 s ago')).toBeTruthy();
      expect(screen.getByRole('heading', { level: 1, name: 'Millrace Waltz' })).toBeTruthy();
      expect(screen.getByText('No signal. This is what was heard last.')).toBeTruthy();
    });

    it('says a new tune aloud, once, with what to turn', async () => {
      let answer = playing();
      open(() => ({ status: 200, body: answer }));
      await pass(100);
      const said = () => screen.getAllByRole('status').map((one) => one.textContent);
      expect(said()).toContain('Playing now: Millrace Waltz, D, waltz. Stay as you are: your fiddle is set.');
      answer = tuning({ version: 2 });
      await pass(2_100);
      expect(said()).toContain(
        'Tune now for Cluck Old Hen, A modal, reel. D peg (3rd): up a whole step, from D to E.',
      );
    });
  });
});

describe('the code page', () => {
  it('takes a code as people type it, and says what is wrong with it', async () => {
    open(playing(), 'fiddle', '/f');
    const field = await screen.findByRole('textbox', { name: 'Code of the evening' });
    const press = () => userEvent.click(screen.getByRole('button', { name: 'Follow' }));
    await press();
    expect(screen.getByRole('alert').textContent).toMatch(/Type the code/);
    await userEvent.type(field, 'qgqe 34');
    await press();
    expect(screen.getByRole('alert').textContent).toBe('A code has 8 letters and figures; this has 6.');
    await userEvent.clear(field);
    await userEvent.type(field, 'QGQE 34E0');
    await press();
    expect(screen.getByRole('alert').textContent).toMatch(/A code has no 0 in it/);
    await userEvent.clear(field);
    await userEvent.type(field, 'qgqe-34es');
    await press();
    expect(await screen.findByRole('heading', { level: 1, name: 'Millrace Waltz' })).toBeTruthy();
  });
});
