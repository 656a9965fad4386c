import type { Follow, LiveState } from '@pegwell/shared/contract/live';
import type { Session } from '@pegwell/shared/contract/sessions';
import type { Caller, TestApp } from './app';
import { buildCircle, buildSession, buildTune, type Person } from './build';

/** A tune of the evening: cells of accepted tunings by kind, as in an import file. */
export interface TuneLine {
  readonly title: string;
  readonly key?: string;
  readonly mode?: string;
  readonly rhythm?: string;
  readonly sitOut?: readonly string[];
  /** `{ fiddle: 'AEAE or GDAE' }` */
  readonly tunings?: Readonly<Record<string, string>>;
}

export interface OpenLine {
  readonly open: Readonly<Record<string, unknown>>;
}

export interface LiveEvening {
  readonly host: Person;
  readonly circleId: string;
  readonly session: Session;
  /** Entry ids in playing order. */
  readonly order: readonly string[];
  /** Takes a step that must be taken. */
  step(action: string, more?: Record<string, unknown>): Promise<LiveState>;
  /** Asks as a phone does, without an account. */
  follow(kind?: string, phone?: Caller): Promise<Follow>;
  /** What the evening's members see of it. */
  read(): Promise<Session>;
}

/** An evening with a board of these sets, not begun. */
export async function buildEvening(
  test: TestApp,
  sets: readonly (readonly (TuneLine | OpenLine)[])[],
  fields: Record<string, unknown> = {},
): Promise<LiveEvening> {
  const { circle, host } = await buildCircle(test);
  const empty = await buildSession(host, circle.id, fields);
  const board = [];
  for (const [index, lines] of sets.entries()) {
    const entries = [];
    for (const line of lines) entries.push(await entryOf(host, circle.id, line));
    board.push({ title: `Set ${index + 1}`, entries });
  }
  const answer = await host.caller
    .put(`/api/sessions/${empty.id}/board`)
    .send({ version: empty.version, sets: board })
    .expect(200);
  const session = answer.body as Session;
  return {
    host,
    circleId: circle.id,
    session,
    order: session.sets.flatMap((set) => set.entries.map(({ id }) => id)),
    step: async (action, more = {}) => {
      const taken = await host.caller
        .post(`/api/sessions/${session.id}/live`)
        .send({ action, ...more })
        .expect(200);
      return taken.body as LiveState;
    },
    follow: async (kind = 'fiddle', phone = test.caller()) => {
      const seen = await phone.get(`/api/follow/${session.code}`).query({ kind }).expect(200);
      return seen.body as Follow;
    },
    read: async () => (await host.caller.get(`/api/sessions/${session.id}`).expect(200)).body as Session,
  };
}

async function entryOf(host: Person, circleId: string, line: TuneLine | OpenLine) {
  if ('open' in line) return line;
  const { sitOut = [], tunings = {}, ...fields } = line;
  const tune = await buildTune(host, circleId, {
    ...fields,
    tunings: Object.entries(tunings).map(([kind, cell]) => ({
      kind,
      accepted: cell.split(' or ').map((text) => {
        const [tuning, capo] = text.split(' capo ');
        return { tuning, ...(capo && { capo: Number(capo) }) };
      }),
    })),
  });
  return { tuneId: tune.id, sitOut };
}

/** Fiddle tunes in A, one per tuning: Tune 1, Tune 2, ... */
export const fiddleTunes = (...cells: string[]): TuneLine[] =>
  cells.map((fiddle, index) => ({ title: `Tune ${index + 1}`, key: 'A', tunings: { fiddle } }));
