import type { CreateSession } from '@pegwell/shared/contract/sessions';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { parseTuning } from '@pegwell/shared/music/tuning';
import { ProblemError, type ProblemIssue } from '../../lib/problem';

/** What people of a kind arrive tuned to: standard, whatever the first tune wants, or a tuning that is typed. */
type Arrival = 'standard' | 'first' | 'typed';

export interface ChairValues {
  readonly kind: string;
  /** How many retune; NaN while the field is empty. */
  readonly count: number;
  readonly arrival: Arrival;
  readonly tuning: string;
}

export interface EveningFormValues {
  readonly title: string;
  /** `2027-01-14`, `19:30`: on the clock of `timeZone`. */
  readonly date: string;
  readonly time: string;
  readonly timeZone: string;
  readonly place: string;
  readonly chairs: ChairValues[];
}

export const newChair = (kind: string): ChairValues => ({ kind, count: 1, arrival: 'standard', tuning: '' });

export const newEvening = (timeZone: string): EveningFormValues => ({
  title: '',
  date: '',
  time: '19:30',
  timeZone,
  place: '',
  chairs: [newChair('fiddle')],
});

export function toCreate(values: EveningFormValues): CreateSession {
  const { title, date, time, timeZone, place, chairs } = values;
  // What is not said is the standard tuning.
  const openings = chairs.flatMap(({ kind, arrival, tuning }): [string, string | null][] =>
    arrival === 'standard' ? [] : [[kind, arrival === 'first' ? null : tuning.trim()]],
  );
  return {
    title,
    startsAt: `${date}T${time}`,
    timeZone,
    ...(place.trim() ? { place } : {}),
    chairs: chairs.map(({ kind, count }) => ({ kind, count })),
    openings: Object.fromEntries(openings),
  };
}

/** Why a typed arrival cannot be read; null when it can, or when none is typed. */
export function arrivalProblem({ kind: id, arrival, tuning }: ChairValues): string | null {
  const kind = builtInKind(id);
  if (arrival !== 'typed' || !kind) return null;
  if (tuning.trim() === '') return 'Say a tuning.';
  const parsed = parseTuning(kind, tuning);
  return parsed.ok ? null : parsed.reason;
}

/** A refusal of what was sent, told at the fields it was typed into. */
export function atFields(error: unknown, { chairs }: EveningFormValues): unknown {
  if (!(error instanceof ProblemError)) return error;
  const { status, code, detail, body } = error;
  const errors = error.errors.map(({ path, message }): ProblemIssue => {
    if (path === 'startsAt') return { path: 'date', message };
    const opening = /^openings\.(.+)$/.exec(path)?.[1];
    const index = chairs.findIndex(({ kind }) => kind === opening);
    return index < 0 ? { path, message } : { path: `chairs.${index}.tuning`, message };
  });
  return new ProblemError({ status, code, detail, body, errors });
}
