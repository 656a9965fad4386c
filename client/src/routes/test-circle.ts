import type { Circle, Role } from '@pegwell/shared/contract/circles';
import type { ShownTuning, Tune } from '@pegwell/shared/contract/tunes';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning, showTuning } from '@pegwell/shared/music/tuning';
import { actionsOf } from '@pegwell/shared/policy';
import { ok, type Answers } from '../lib/mock-api';

/** Ids as the server gives them, for tests: `id(3)`. */
export const id = (number: number): string => `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;

const CIRCLE = id(1);
export const at = (path: string): string => `/c/${CIRCLE}/${path}`;
export const api = (method: string, path: string): string => `${method} /api/circles/${CIRCLE}${path}`;

/** What every page of a circle asks for, for somebody with this role. */
export function circleAnswers(role: Role): Answers {
  const circle: Circle = {
    id: CIRCLE,
    name: 'Heron Weir Circle',
    role,
    timeZone: 'Europe/London',
    referenceA: 440,
    can: actionsOf(role),
  };
  return {
    'GET /api/auth/me': ok({
      user: { id: id(2), email: 'ada@example.org', displayName: 'Ada Weir', confirmed: true },
      circles: [{ id: CIRCLE, name: circle.name, role }],
    }),
    [api('GET', '')]: ok(circle),
    [api('GET', '/usual-tunings')]: ok({ items: [] }),
  };
}

/** A problem document with what is wrong at each path. */
export const refusal = (status: number, code: string, errors: Readonly<Record<string, string>> = {}) => ({
  status,
  body: {
    status,
    code,
    title: 'Refused',
    detail: Object.values(errors)[0] ?? 'Refused.',
    errors: Object.entries(errors).map(([path, message]) => ({ path, message })),
  },
});

export function shown(kindId: string, text: string): ShownTuning {
  const kind = builtInKind(kindId);
  if (text === 'any' || !kind) return { tuning: 'any', pitches: null, capo: 0 };
  const tuned = parseTuning(kind, text);
  if (!tuned.ok) throw new Error(tuned.reason);
  const { pitches, capo } = tuned.value;
  return { tuning: showTuning(kind, pitches), pitches: [...pitches], capo };
}

export const tune = (number: number, title: string, more: Partial<Tune> = {}): Tune => ({
  id: id(number),
  settingId: id(number + 500),
  title,
  key: 'A',
  mode: 'modal',
  rhythm: 'reel',
  parts: null,
  composer: null,
  source: null,
  notes: null,
  tunings: [{ kind: 'fiddle', accepted: [shown('fiddle', 'AEAE'), shown('fiddle', 'GDAE')] }],
  assumed: [{ kind: 'banjo', accepted: [shown('banjo', 'gDGCD capo 2')] }],
  createdAt: '2026-11-01T10:00:00.000Z',
  updatedAt: '2026-11-01T10:00:00.000Z',
  can: [],
  ...more,
});

export const page = <T>(items: readonly T[], total = items.length) => ({
  items,
  total,
  page: 1,
  pageSize: 50,
});
