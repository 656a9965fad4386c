import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { mockApi, ok, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, page, refusal, tune } from './test-circle';

const list = api('GET', '/tunes');
const twoTunes = [
  tune(11, 'Cluck Old Hen'),
  tune(12, 'Millrace Waltz', { key: 'D', mode: 'major', rhythm: 'waltz' }),
];

/** Answers with two tunes and keeps what was asked for. */
function watched(asked: URLSearchParams[], total = 2): Answers {
  return {
    ...circleAnswers('host'),
    [list]: (_, url) => {
      asked.push(url.searchParams);
      return { status: 200, body: page(twoTunes, total) };
    },
  };
}

describe('the library', () => {
  it('shows key, rhythm and tunings, and says aloud which are assumed', async () => {
    mockApi({ ...circleAnswers('host'), [list]: ok(page(twoTunes)) });
    renderApp(at('tunes'));
    const row = (await screen.findByRole('rowheader', { name: 'Cluck Old Hen' })).closest('tr')!;
    expect(within(row).getByText('A modal')).toBeTruthy();
    expect(within(row).getByText('reel')).toBeTruthy();
    expect(within(row).getByRole('img', { name: 'A E A E' })).toBeTruthy();
    const banjo = within(row).getByRole('img', { name: 'g D G C D, capo 2' }).closest('td')!;
    expect(within(banjo).getByText('assumed')).toBeTruthy();
    const fiddle = within(row).getByRole('img', { name: 'A E A E' }).closest('td')!;
    expect(within(fiddle).queryByText('assumed')).toBeNull();
  });

  it('gives a host the ways to change it, and a player none', async () => {
    mockApi({ ...circleAnswers('host'), [list]: ok(page(twoTunes)) });
    const { unmount } = renderApp(at('tunes'));
    expect(await screen.findByRole('link', { name: 'Add a tune' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Import a list' })).toBeTruthy();
    unmount();
    mockApi({ ...circleAnswers('player'), [list]: ok(page(twoTunes)) });
    renderApp(at('tunes'));
    expect(await screen.findByRole('link', { name: 'Cluck Old Hen' })).toBeTruthy();
    expect(screen.queryByRole('link', { name: 'Add a tune' })).toBeNull();
    expect(screen.queryByRole('link', { name: 'Import a list' })).toBeNull();
  });

  it('asks the server with the filters of the address', async () => {
    const asked: URLSearchParams[] = [];
    mockApi(watched(asked));
    renderApp(at('tunes?search=hen&kind=fiddle&tuning=AEAE&key=A&mode=modal&rhythm=reel&page=2&sort=-key'));
    await screen.findByRole('link', { name: 'Cluck Old Hen' });
    expect(Object.fromEntries(asked[0]!)).toEqual({
      ...{ search: 'hen', kind: 'fiddle', tuning: 'AEAE', key: 'A', mode: 'modal', rhythm: 'reel' },
      ...{ page: '2', sort: '-key', pageSize: '50' },
    });
    expect(screen.getByLabelText<HTMLInputElement>('Fiddle tuning').value).toBe('AEAE');
  });

  it('searches when the typing pauses, from the first page again', async () => {
    const asked: URLSearchParams[] = [];
    mockApi(watched(asked, 200));
    renderApp(at('tunes?page=3'));
    const field = await screen.findByLabelText('Search titles');
    // Three letters at once are one question, not three.
    for (const value of ['h', 'he', 'hen']) fireEvent.change(field, { target: { value } });
    await waitFor(() => expect(asked.at(-1)?.get('search')).toBe('hen'));
    expect(asked.at(-1)?.get('page')).toBe('1');
    expect(asked.map((params) => params.get('search'))).toEqual([null, 'hen']);
  });

  it('sorts by a heading, and turns round on the second press', async () => {
    const asked: URLSearchParams[] = [];
    mockApi(watched(asked));
    renderApp(at('tunes'));
    const heading = await screen.findByRole('columnheader', { name: 'Key' });
    await userEvent.click(within(heading).getByRole('button'));
    await waitFor(() => expect(asked.at(-1)?.get('sort')).toBe('key'));
    expect(screen.getByRole('columnheader', { name: 'Key' }).getAttribute('aria-sort')).toBe('ascending');
    await userEvent.click(within(screen.getByRole('columnheader', { name: 'Key' })).getByRole('button'));
    await waitFor(() => expect(asked.at(-1)?.get('sort')).toBe('-key'));
  });

  it('goes to the next page and says where one is', async () => {
    const asked: URLSearchParams[] = [];
    mockApi(watched(asked, 120));
    renderApp(at('tunes'));
    expect(await screen.findByText('1 to 50 of 120 tunes')).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Next' }));
    await waitFor(() => expect(asked.at(-1)?.get('page')).toBe('2'));
    expect(await screen.findByText('51 to 100 of 120 tunes')).toBeTruthy();
  });

  it('reads a tuning back at its field, and asks for nothing that cannot be read', async () => {
    const asked: URLSearchParams[] = [];
    mockApi(watched(asked));
    renderApp(at('tunes?kind=fiddle'));
    const field = await screen.findByLabelText('Fiddle tuning');
    fireEvent.change(field, { target: { value: 'AEAC#' } });
    expect(await screen.findByText('A3 E4 A4 C#5, calico')).toBeTruthy();
    await waitFor(() => expect(asked.at(-1)?.get('tuning')).toBe('AEAC#'));
    fireEvent.change(field, { target: { value: 'GDA' } });
    expect(await screen.findByText('A fiddle has 4 strings; GDA names 3: G D A.')).toBeTruthy();
    expect(asked.map((params) => params.get('tuning'))).toEqual([null, 'AEAC#']);
  });

  it('says at the field what the server makes of a tuning in the address', async () => {
    mockApi({
      ...circleAnswers('host'),
      [list]: () => refusal(422, 'cannot-be', { tuning: 'No fiddle is tuned so.' }),
    });
    renderApp(at('tunes?kind=fiddle&tuning=GDA'));
    expect(await screen.findByText('No fiddle is tuned so.')).toBeTruthy();
    expect(screen.getByLabelText('Fiddle tuning').getAttribute('aria-invalid')).toBe('true');
    expect(screen.queryByText('The tunes could not be loaded')).toBeNull();
  });

  it('tells an empty circle what to do first; a player that there is nothing yet', async () => {
    mockApi({ ...circleAnswers('cohost'), [list]: ok(page([])) });
    const { unmount } = renderApp(at('tunes'));
    expect(await screen.findByRole('heading', { name: 'First, bring your tunes' })).toBeTruthy();
    expect(screen.getByRole('link', { name: 'Import a list' }).getAttribute('href')).toBe(at('tunes/import'));
    unmount();
    mockApi({ ...circleAnswers('player'), [list]: ok(page([])) });
    renderApp(at('tunes'));
    expect(await screen.findByRole('heading', { name: 'No tunes yet' })).toBeTruthy();
    expect(screen.queryByRole('link', { name: 'Import a list' })).toBeNull();
  });

  it('shows all again when nothing fits', async () => {
    mockApi({
      ...circleAnswers('host'),
      [list]: (_, url) => ({ status: 200, body: page(url.searchParams.get('search') ? [] : twoTunes) }),
    });
    renderApp(at('tunes?search=zzz'));
    expect(await screen.findByRole('heading', { name: 'No tune fits' })).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Show all tunes' }));
    expect(await screen.findByRole('link', { name: 'Cluck Old Hen' })).toBeTruthy();
  });

  it('says that the tunes could not be loaded, and asks again', async () => {
    let up = false;
    mockApi({
      ...circleAnswers('host'),
      [list]: () => (up ? { status: 200, body: page(twoTunes) } : refusal(503, 'unavailable')),
    });
    renderApp(at('tunes'));
    expect(await screen.findByRole('heading', { name: 'The tunes could not be loaded' })).toBeTruthy();
    up = true;
    await userEvent.click(screen.getByRole('button', { name: 'Try again' }));
    expect(await screen.findByRole('link', { name: 'Cluck Old Hen' })).toBeTruthy();
  });
});
