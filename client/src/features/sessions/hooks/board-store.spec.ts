import type { Session, ShownEntry } from '@pegwell/shared/contract/sessions';
import { entriesOf, spotAt, type Board } from '@pegwell/shared/session/board';
import type { BoardOperation } from '@pegwell/shared/session/board-operations';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { ProblemError } from '../../../lib/problem';
import { BoardServer, shownEntry, sessionOf, uuid } from './board-fixtures';
import { BoardStore } from './board-store';
import { browserStorage } from './pending-storage';

const [one, two, three] = [
  shownEntry(1, 'Stone Weir'),
  shownEntry(2, 'Slack Tide'),
  shownEntry(3, 'Lantern Hill'),
];
const added = shownEntry(9, 'Grey Owl', { fiddle: 'GDAD' });
const theirs = shownEntry(8, 'June Apple', { fiddle: 'AEAE' });
const SET = uuid(800);

let ids = 0;
function hold(server: BoardServer, who = 'Ida', session: Session = server.session): BoardStore {
  return new BoardStore(session, {
    put: (body) => server.put(body, who),
    accept: () => Promise.reject(new Error('not asked for here')),
    storage: browserStorage(who, session.id),
    newId: () => `action-${(ids += 1)}`,
  });
}

const serverWith = (...entries: ShownEntry[]) => {
  const server = new BoardServer(sessionOf([entries]));
  server.learn([added, theirs]);
  return server;
};
const add = (board: Board<ShownEntry>, entry: ShownEntry, index: number): BoardOperation<ShownEntry>[] => [
  { type: 'add-entry', entry, to: spotAt(board, SET, index) },
];
const titles = (store: BoardStore) => entriesOf(store.getState().board).map(({ title }) => title);
const stored = (server: BoardServer) =>
  server.session.sets.flatMap(({ entries }) => entries.map(({ title }) => title));

beforeEach(() => vi.useFakeTimers());
afterEach(() => vi.useRealTimers());

describe('a board in the hand of a host', () => {
  it('shows a change at once and saves it after a pause, several changes in one save', async () => {
    const server = serverWith(one, two);
    const store = hold(server);
    store.perform('Added Grey Owl', add(store.getState().board, added, 1));
    store.perform('Pinned Slack Tide', [{ type: 'set-pinned', entryId: two.id, pinned: true }]);
    expect(titles(store)).toEqual(['Stone Weir', 'Grey Owl', 'Slack Tide']);
    expect(store.getState()).toMatchObject({ saving: 'waiting', waiting: 2 });
    expect(server.received).toHaveLength(0);
    await vi.advanceTimersByTimeAsync(500);
    expect(server.received).toHaveLength(1);
    expect(stored(server)).toEqual(['Stone Weir', 'Grey Owl', 'Slack Tide']);
    expect(store.getState()).toMatchObject({ saving: 'saved', waiting: 0 });
  });

  it('applies what is unsaved to the newer board when somebody else was first', async () => {
    const server = serverWith(one, two);
    const [ida, mara] = [hold(server), hold(server, 'Mara')];
    mara.perform('Added June Apple', add(mara.getState().board, theirs, 0));
    await mara.flush();
    ida.perform('Added Grey Owl', add(ida.getState().board, added, 2));
    await ida.flush();
    expect(stored(server)).toEqual(['June Apple', 'Stone Weir', 'Slack Tide', 'Grey Owl']);
    expect(ida.getState()).toMatchObject({ saving: 'saved', takenIn: { who: 'Mara' } });
  });

  it('keeps three changes of a host who is offline, and loses neither these nor the other host’s', async () => {
    const server = serverWith(one, two, three);
    const [ida, mara] = [hold(server), hold(server, 'Mara')];
    server.failing = 'before';
    for (const [label, operations] of [
      ['Added Grey Owl', add(ida.getState().board, added, 1)],
      ['Pinned Slack Tide', [{ type: 'set-pinned', entryId: two.id, pinned: true }]],
      [
        'Moved Lantern Hill',
        [{ type: 'move-entry', entryId: three.id, to: spotAt(ida.getState().board, SET, 0, three.id) }],
      ],
    ] as const) {
      ida.perform(label, operations);
      await vi.advanceTimersByTimeAsync(500);
    }
    expect(ida.getState()).toMatchObject({ saving: 'offline', waiting: 3 });
    server.failing = null;
    mara.perform('Added June Apple', add(mara.getState().board, theirs, 3));
    mara.perform('Took out Stone Weir', [{ type: 'remove-entry', entryId: one.id }]);
    await mara.flush();
    ida.wake();
    await vi.advanceTimersByTimeAsync(100);
    expect(stored(server)).toEqual(['Lantern Hill', 'Grey Owl', 'Slack Tide', 'June Apple']);
    expect(server.session.sets[0]?.entries.find(({ id }) => id === two.id)?.pinned).toBe(true);
    mara.receive(server.session);
    expect(titles(mara)).toEqual(titles(ida));
  });

  it('sends a save again as it was when its answer was lost, so nothing is done twice', async () => {
    const server = serverWith(one, two);
    const store = hold(server);
    server.failing = 'after';
    store.perform('Added Grey Owl', add(store.getState().board, added, 1));
    await vi.advanceTimersByTimeAsync(500);
    store.perform('Moved Stone Weir', [
      { type: 'move-entry', entryId: one.id, to: spotAt(store.getState().board, SET, 2, one.id) },
    ]);
    // What the save did is seen by a poll before its answer: it is ours, and not taken for news.
    store.receive(server.session);
    server.failing = null;
    await vi.advanceTimersByTimeAsync(2_000);
    expect(server.received[1]).toEqual(server.received[0]);
    expect(stored(server)).toEqual(['Grey Owl', 'Slack Tide', 'Stone Weir']);
    expect(store.getState()).toMatchObject({ saving: 'saved', takenIn: null });
  });

  it('tries again by itself, with longer pauses', async () => {
    const server = serverWith(one);
    const store = hold(server);
    server.failing = 'before';
    store.perform('Pinned', [{ type: 'set-pinned', entryId: one.id, pinned: true }]);
    await vi.advanceTimersByTimeAsync(400 + 1_000 + 2_000 + 4_000 + 50);
    expect(server.received).toHaveLength(4);
    server.failing = null;
    await vi.advanceTimersByTimeAsync(8_000);
    expect(store.getState().saving).toBe('saved');
  });

  it('still has what was not saved after a reload', async () => {
    const server = serverWith(one);
    server.failing = 'before';
    const before = hold(server);
    before.perform('Added Grey Owl', add(before.getState().board, added, 1));
    server.failing = null;
    const after = hold(server);
    expect(titles(after)).toEqual(['Stone Weir', 'Grey Owl']);
    after.wake();
    await vi.advanceTimersByTimeAsync(10);
    expect(stored(server)).toEqual(['Stone Weir', 'Grey Owl']);
    expect(localStorage).toHaveLength(0);
  });

  it('leaves out what the server refuses, says so, and saves the rest', async () => {
    const server = serverWith(one, two);
    const put = vi.spyOn(server, 'put');
    put.mockRejectedValueOnce(
      new ProblemError({
        ...{ status: 422, code: 'cannot-be', detail: 'It cannot be.' },
        errors: [{ path: 'sets.0.entries.1.tuneId', message: 'This tune is not in the circle’s library.' }],
      }),
    );
    const store = hold(server);
    store.perform('Pinned Slack Tide', [{ type: 'set-pinned', entryId: two.id, pinned: true }]);
    store.perform('Added Grey Owl', add(store.getState().board, added, 1));
    await store.flush();
    expect(stored(server)).toEqual(['Stone Weir', 'Slack Tide']);
    expect(server.session.sets[0]?.entries[1]?.pinned).toBe(true);
    expect(store.getState().problems).toEqual([
      'This tune is not in the circle’s library. Left out: “Added Grey Owl”.',
    ]);
  });

  it('undoes its own work by id and leaves the other host’s', async () => {
    const server = serverWith(one, two);
    const [ida, mara] = [hold(server), hold(server, 'Mara')];
    ida.perform('Added Grey Owl', add(ida.getState().board, added, 1));
    await ida.flush();
    mara.receive(server.session);
    mara.perform('Added June Apple', add(mara.getState().board, theirs, 2));
    await mara.flush();
    ida.receive(server.session);
    expect(ida.undo()).toBe('Added Grey Owl');
    expect(titles(ida)).toEqual(['Stone Weir', 'June Apple', 'Slack Tide']);
    expect(ida.redo()).toBe('Added Grey Owl');
    expect(titles(ida)).toEqual(['Stone Weir', 'Grey Owl', 'June Apple', 'Slack Tide']);
  });

  it('says when there is nothing left to undo', async () => {
    const server = serverWith(one, two);
    const [ida, mara] = [hold(server), hold(server, 'Mara')];
    ida.perform('Pinned Slack Tide', [{ type: 'set-pinned', entryId: two.id, pinned: true }]);
    await ida.flush();
    mara.receive(server.session);
    mara.perform('Took out Slack Tide', [{ type: 'remove-entry', entryId: two.id }]);
    await mara.flush();
    ida.receive(server.session);
    expect(ida.undo()).toBeNull();
    expect(ida.getState().problems[0]).toContain('could not be undone');
  });

  it('keeps what was called at its place while the evening is live', () => {
    const session = sessionOf([[one, two, three]], {
      ...{ status: 'live', called: [one.id], nowEntryId: two.id, inForce: { fiddle: 'GDAE' } },
    });
    const store = hold(new BoardServer(session));
    const { board } = store.getState();
    expect(
      store.perform('Moved', [
        { type: 'move-entry', entryId: three.id, to: spotAt(board, SET, 0, three.id) },
      ]),
    ).toBe(false);
    expect(store.getState().problems).toEqual(['Number 1 was called already and stays at its place.']);
    expect(store.perform('Took out', [{ type: 'remove-entry', entryId: three.id }])).toBe(true);
  });

  it('makes nothing of a change that changes nothing', () => {
    const store = hold(serverWith(one));
    expect(store.perform('Pinned', [{ type: 'set-pinned', entryId: one.id, pinned: false }])).toBe(false);
    expect(store.getState()).toMatchObject({ waiting: 0, undo: null });
  });
});
