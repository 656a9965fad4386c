import { fireEvent, screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import type { ImportReport } from '@pegwell/shared/contract/tunes';
import { describe, expect, it } from 'vitest';
import { mockApi, ok, type Answer, type Answers } from '../lib/mock-api';
import { renderApp } from './test-app';
import { api, at, circleAnswers, id, page, refusal, tune } from './test-circle';

const report: ImportReport = {
  format: 'csv',
  encoding: 'utf-8',
  importId: id(40),
  read: 4,
  created: 1,
  updated: 1,
  unchanged: 1,
  skipped: 1,
  problems: [{ line: 5, tune: 'Short', message: 'A fiddle has 4 strings; GDA names 3: G D A.' }],
  tunes: [
    { line: 2, title: 'Slack Tide', action: 'create' },
    { line: 3, title: 'Grey Owl', action: 'update', id: id(31) },
    { line: 4, title: 'Stone Weir', action: 'unchanged', id: id(32) },
    { line: 5, title: 'Short', action: 'skip' },
  ],
};
const post = api('POST', '/tunes/import');
const csv = (text = 'title,key\nSlack Tide,G\n') => new File([text], 'tunes.csv', { type: 'text/csv' });
const choose = async (file: File) => {
  const field = await screen.findByLabelText(/Choose a(nother)? file/);
  fireEvent.change(field, { target: { files: [file] } });
};
const start = (answers: Answers) => {
  const asked = mockApi({
    ...circleAnswers('host'),
    [api('GET', '/tunes')]: ok(page([tune(1, 'A')])),
    [api('GET', '/tunes/imports')]: ok({ items: [] }),
    ...answers,
  });
  renderApp(at('tunes/import'));
  return asked;
};

describe('importing a list', () => {
  it('shows first what will become of every line, and writes nothing', async () => {
    const urls: URL[] = [];
    start({
      [post]: (_, url) => {
        urls.push(url);
        return { status: 200, body: report };
      },
    });
    await choose(csv());
    const bad = (await screen.findByRole('rowheader', { name: 'Short' })).closest('tr')!;
    expect(within(bad).getByText('left out')).toBeTruthy();
    expect(within(bad).getByText('A fiddle has 4 strings; GDA names 3: G D A.')).toBeTruthy();
    expect(screen.getByRole('button', { name: 'Import 2 tunes' })).toBeTruthy();
    expect(urls.map((url) => url.searchParams.get('dryRun'))).toEqual(['true']);
  });

  it('filters the lines by what becomes of them', async () => {
    start({ [post]: ok(report) });
    await choose(csv());
    await userEvent.click(await screen.findByRole('button', { name: '1 left out' }));
    expect(screen.getAllByRole('rowheader').map((cell) => cell.textContent)).toEqual(['Short']);
    await userEvent.click(screen.getByRole('button', { name: '4 read' }));
    expect(screen.getAllByRole('rowheader')).toHaveLength(4);
  });

  it('draws a hundred lines of a long file at a time', async () => {
    const tunes = Array.from({ length: 5000 }, (_, index) => ({
      line: index + 2,
      title: `Long List ${index}`,
      action: 'create' as const,
    }));
    start({ [post]: ok({ ...report, read: 5000, created: 5000, updated: 0, tunes, problems: [] }) });
    await choose(csv());
    expect(await screen.findByRole('rowheader', { name: 'Long List 99' })).toBeTruthy();
    expect(screen.queryByRole('rowheader', { name: 'Long List 100' })).toBeNull();
    fireEvent.click(screen.getByRole('button', { name: 'Next' }));
    expect(screen.getByRole('rowheader', { name: 'Long List 100' })).toBeTruthy();
  });

  it('writes under an id, moves the bar with the rows written, and sums up', async () => {
    let finish: (answer: Answer) => void = () => undefined;
    let watched = '';
    const asked = mockApi({
      ...circleAnswers('host'),
      [api('GET', '/tunes')]: ok(page([tune(1, 'A')])),
      [api('GET', '/tunes/imports')]: ok({ items: [] }),
      [post]: ok(report),
    });
    const answered = fetch;
    // The second import answers when the test says so; meanwhile its progress is asked for by its id.
    const held: typeof fetch = (input, init) => {
      const url = new URL(input as string, 'http://pegwell.test');
      if (url.pathname.includes('/imports/')) {
        return Promise.resolve(
          new Response(JSON.stringify({ total: 2, written: 1, finished: false }), { status: 200 }),
        );
      }
      if (url.searchParams.get('dryRun') !== 'false') return answered(input, init);
      watched = url.searchParams.get('progress') ?? '';
      return new Promise((resolve) => {
        finish = ({ status, body }) => resolve(new Response(JSON.stringify(body), { status }));
      });
    };
    globalThis.fetch = held;
    renderApp(at('tunes/import'));
    await choose(csv());
    await userEvent.click(await screen.findByRole('button', { name: 'Import 2 tunes' }));
    expect(await screen.findByText('1 of 2 tunes written')).toBeTruthy();
    expect(screen.getByRole('progressbar').getAttribute('aria-valuenow')).toBe('1');
    expect(watched).toMatch(/^[0-9a-f]{8}-[0-9a-f]{4}-4[0-9a-f]{3}-[89ab][0-9a-f]{3}-[0-9a-f]{12}$/);
    finish({ status: 200, body: report });
    expect(await screen.findByText('1 added, 1 changed, 1 unchanged, 1 left out.')).toBeTruthy();
    expect(screen.getByRole('link', { name: 'To the tunes' }).getAttribute('href')).toBe(at('tunes'));
    expect(asked.filter((name) => name === post)).toHaveLength(1);
  });

  it.each([
    [422, 'cannot-be', 'This file is empty.'],
    [422, 'cannot-be', 'This file is not text.'],
    [415, 'wrong-media-type', 'Tunes are read from files whose names end in .csv or .abc.'],
  ])(
    'says of a bad file (%i %s) what the server says, at the file, which stays chosen',
    async (status, code, sentence) => {
      start({ [post]: () => refusal(status, code, { file: sentence }) });
      await choose(csv(''));
      expect(await screen.findByText(sentence)).toBeTruthy();
      expect(screen.getByLabelText('Choose another file').getAttribute('aria-invalid')).toBe('true');
      expect(screen.getByText('tunes.csv')).toBeTruthy();
      expect(screen.queryByRole('button', { name: /^Import / })).toBeNull();
    },
  );

  it('does not send a file over ten megabytes', async () => {
    const asked = start({});
    const large = csv();
    Object.defineProperty(large, 'size', { value: 10 * 1024 * 1024 + 1 });
    await choose(large);
    expect(await screen.findByText('A file of tunes is at most 10 MB.')).toBeTruthy();
    expect(asked).not.toContain(post);
  });

  it('proposes tunings and likely duplicates, and sends what is chosen', async () => {
    const bodies: FormData[] = [];
    const tunes: ImportReport['tunes'] = [
      {
        ...{ line: 2, title: 'Slack Tide (AEAE)', action: 'create' },
        found: [{ kind: 'fiddle', tuning: 'AEAE', said: 'AEAE' }],
      },
      {
        ...{
          line: 3,
          title: 'The Grey Owl',
          action: 'create',
          key: 'G',
          mode: 'major',
          rhythm: null,
          tunings: [],
        },
        alike: [
          {
            id: id(31),
            title: 'Grey Owl',
            key: 'D',
            mode: 'dorian',
            rhythm: 'reel',
            tunings: [{ kind: 'fiddle', tuning: 'ADAE' }],
          },
        ],
      },
    ];
    const proposing = {
      ...report,
      read: 2,
      created: 2,
      updated: 0,
      unchanged: 0,
      skipped: 0,
      tunes,
      problems: [],
    };
    start({
      [post]: ok(proposing),
    });
    const answered = fetch;
    globalThis.fetch = (input, init) => {
      if (init?.body instanceof FormData) bodies.push(init.body);
      return answered(input, init);
    };
    await choose(csv());
    expect(await screen.findByText(/0 of 1 taken/)).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: '1 likely there already' }));
    expect(screen.getAllByRole('rowheader').map((cell) => cell.textContent)).toEqual(['The Grey Owl']);
    const group = screen.getByRole('group', { name: 'Likely a tune that is there already: The Grey Owl' });
    expect(within(group).getByText('ADAE')).toBeTruthy();
    expect(within(group).getByLabelText<HTMLInputElement>('Keep both').checked).toBe(true);
    await userEvent.click(within(group).getByLabelText('Add what is new to Grey Owl (D dorian)'));
    await userEvent.click(screen.getByRole('button', { name: 'Take all that were found' }));
    expect(screen.getByText(/1 of 1 taken/)).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Import 2 tunes' }));
    await screen.findByText('2 added, 0 changed, 0 unchanged, 0 left out.');
    expect(
      bodies.map((body) => JSON.parse((body.get('choices') as string | null) ?? '[]') as unknown),
    ).toEqual([
      [],
      [
        { line: 3, found: [], alike: 'merge', with: id(31) },
        { line: 2, found: ['fiddle'], alike: 'keep' },
      ],
    ]);
    // What was done leaves nothing to choose.
    expect(screen.queryByText('Keep both')).toBeNull();
  });

  it('leaves a likely duplicate out of what it counts', async () => {
    const alike = [{ line: 2, title: 'Owl', key: 'G', mode: 'major' as const, rhythm: null, tunings: [] }];
    const tunes: ImportReport['tunes'] = [
      { line: 2, title: 'Owl', action: 'create' },
      { line: 3, title: 'The Owl', action: 'create', alike },
    ];
    start({ [post]: ok({ ...report, created: 2, updated: 0, skipped: 0, tunes, problems: [] }) });
    await choose(csv());
    await userEvent.click(await screen.findByLabelText('Leave this one out'));
    expect(screen.getByRole('button', { name: 'Import 1 tune' })).toBeTruthy();
    expect(screen.getByText('In line 2')).toBeTruthy();
  });

  it('reads a pasted list, and says at the list what is wrong with it', async () => {
    const urls: URL[] = [];
    start({
      [post]: (_, url) => {
        urls.push(url);
        return refusal(422, 'cannot-be', { file: 'This file is empty.' });
      },
    });
    const field = await screen.findByLabelText('Or paste a list');
    await userEvent.click(screen.getByRole('button', { name: 'Read the list' }));
    expect(await screen.findByText('Nothing is pasted yet.')).toBeTruthy();
    expect(urls).toEqual([]);
    await userEvent.type(field, 'June Apple (A)');
    await userEvent.click(screen.getByRole('button', { name: 'Read the list' }));
    expect(await screen.findByText('This file is empty.')).toBeTruthy();
    expect(field.getAttribute('aria-invalid')).toBe('true');
    expect(urls.map(({ searchParams }) => searchParams.get('pasted'))).toEqual(['true']);
  });

  it('says in which encoding a file was read that does not say so itself', async () => {
    start({ [post]: ok({ ...report, encoding: 'windows-1252' }) });
    await choose(csv());
    expect(await screen.findByText(/it was read as windows-1252/)).toBeTruthy();
  });

  it('asks again under the same id when the connection breaks', async () => {
    start({ [post]: ok(report) });
    const answered = fetch;
    const ids: (string | null)[] = [];
    globalThis.fetch = (input, init) => {
      const url = new URL(input as string, 'http://pegwell.test');
      if (url.searchParams.get('dryRun') !== 'false') return answered(input, init);
      ids.push(url.searchParams.get('progress'));
      return ids.length === 1 ? Promise.reject(new TypeError('gone')) : answered(input, init);
    };
    await choose(csv());
    await userEvent.click(await screen.findByRole('button', { name: 'Import 2 tunes' }));
    expect(await screen.findByText(/The connection broke. The import goes on/)).toBeTruthy();
    expect(await screen.findByText(/^1 added/, {}, { timeout: 5_000 })).toBeTruthy();
    expect(ids).toHaveLength(2);
    expect(ids[0]).toBe(ids[1]);
  });

  it('undoes as one step, and lists what stays', async () => {
    start({
      [post]: ok(report),
      [api('POST', `/tunes/imports/${id(40)}/undo`)]: ok({
        ...{ removed: 3, restored: 1 },
        kept: [{ id: id(33), title: 'Changed Since' }],
      }),
    });
    await choose(csv());
    await userEvent.click(await screen.findByRole('button', { name: 'Import 2 tunes' }));
    await userEvent.click(await screen.findByRole('button', { name: 'Undo this import' }));
    expect(await screen.findByText('Undone: 3 tunes taken out, 1 as before.')).toBeTruthy();
    expect(screen.getByText('Changed Since')).toBeTruthy();
  });

  it('lists what was imported within a day, to be undone', async () => {
    const item = { id: id(41), at: '2026-11-30T19:30:00Z', format: 'list', created: 1_200, updated: 3 };
    start({
      [api('GET', '/tunes/imports')]: ok({ items: [item] }),
      [api('POST', `/tunes/imports/${id(41)}/undo`)]: ok({ removed: 1, restored: 0, kept: [] }),
    });
    expect(await screen.findByText(/A pasted list: 1,200 added, 3 changed\./)).toBeTruthy();
    await userEvent.click(screen.getByRole('button', { name: 'Undo this import' }));
    expect(await screen.findByText('Undone: 1 tune taken out, 0 as before.')).toBeTruthy();
  });

  it('offers nothing to write where nothing would change', async () => {
    start({ [post]: ok({ ...report, created: 0, updated: 0 }) });
    await choose(csv());
    expect(await screen.findByText('Nothing here would change the library.')).toBeTruthy();
    expect(screen.queryByRole('button', { name: /^Import / })).toBeNull();
  });

  it('is not for a player', async () => {
    mockApi({ ...circleAnswers('player'), [api('GET', '/tunes')]: ok(page([tune(1, 'Grey Owl')])) });
    renderApp(at('tunes/import'));
    await waitFor(() => expect(screen.getByRole('heading', { level: 1 }).textContent).toBe('Tunes'));
  });
});
