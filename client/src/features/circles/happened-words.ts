import type { EventKind, Happened } from '@pegwell/shared/contract/history';
import { count, listOf } from '../../lib/format';

/** Fields as a page calls them; others by the words they are made of. */
const FIELDS: Readonly<Record<string, string>> = {
  startsAt: 'when it starts',
  localStart: 'when it starts',
  timeZone: 'its time zone',
  chairs: 'who retunes',
  openings: 'what to arrive tuned to',
  spacedRhythms: 'rhythms kept apart',
  goal: 'what an order aims at',
  stated: 'its tunings',
  key: 'its key',
  mode: 'its mode',
  title: 'its title',
};
/** Kept beside what the host changed, and said by it already. */
const UNSAID = new Set(['localStart', 'updatedBy', 'calendarSequence', 'role']);

type Sentence = (event: Happened) => string;

const SENTENCES: Readonly<Record<EventKind, Sentence>> = {
  'circle.created': ({ subject }) => `made the circle ${subject ?? ''}`,
  'member.added': ({ subject, role }) => `added ${person(subject)} as ${role ?? 'player'}`,
  'member.changed': ({ subject, role }) => `made ${person(subject)} a ${role ?? 'player'}`,
  'member.removed': ({ subject }) => `took ${person(subject)} out of the circle`,
  'member.left': () => 'left the circle',
  'usual-tunings.changed': () => 'changed the usual tunings',
  'tune.created': ({ subject }) => `added the tune ${subject ?? ''}`,
  'tune.changed': (event) => `changed the tune ${event.subject ?? ''}${fields(event)}`,
  'tune.removed': ({ subject }) => `removed the tune ${subject ?? ''}`,
  'tune.restored': ({ subject }) => (subject ? `brought back the tune ${subject}` : 'brought back a tune'),
  'tunes.imported': ({ counts }) =>
    `imported a file: ${count(counts?.created ?? 0, 'new tune')}, ${counts?.updated ?? 0} changed`,
  'tunes.import-undone': () => 'undid an import',
  'session.created': ({ subject }) => `planned the evening ${subject ?? ''}`,
  'session.changed': (event) => `changed the evening ${event.subject ?? ''}${fields(event)}`,
  'session.removed': ({ subject }) => `removed the evening ${subject ?? ''}`,
  'session.code-changed': ({ subject }) => `gave the evening ${subject ?? ''} another code`,
  'session.started': ({ subject }) => `started the evening ${subject ?? ''}`,
  'session.finished': ({ subject }) => `finished the evening ${subject ?? ''}`,
};

/** "Ada Weir changed the tune Slack Tide: its key" */
export function happenedWords(event: Happened): { readonly who: string; readonly did: string } {
  return { who: person(event.who), did: SENTENCES[event.what](event).trim() };
}

function person(name: string | null): string {
  return name ?? 'somebody whose account is gone';
}

function fields({ changed }: Happened): string {
  const said = new Set(changed.filter((name) => !UNSAID.has(name)).map((name) => FIELDS[name] ?? name));
  return said.size > 0 ? `: ${listOf([...said])}` : '';
}
