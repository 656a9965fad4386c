import type { Follow, FollowMove, FollowTune } from '@pegwell/shared/contract/live';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { retune } from '@pegwell/shared/music/retune';
import { parseTuning, showTuning, type Tuned } from '@pegwell/shared/music/tuning';

/** Answers as the server gives them, for tests. */

function read(kindId: string, text: string): Tuned {
  const kind = builtInKind(kindId);
  const parsed = kind && parseTuning(kind, text);
  if (!parsed?.ok) throw new Error(`${kindId} ${text}`);
  return parsed.value;
}

export function move(
  kindId: string,
  fromText: string,
  toText: string,
  gentler: string | null = null,
): FollowMove {
  const kind = builtInKind(kindId);
  if (!kind) throw new Error(kindId);
  const [from, to] = [read(kindId, fromText), read(kindId, toText)];
  const { deltas, pegChanges } = retune(kind, from.pitches, to.pitches);
  return {
    deltas: [...deltas],
    pegChanges,
    from: showTuning(kind, from.pitches),
    to: showTuning(kind, to.pitches),
    capoFrom: from.capo,
    capoTo: to.capo,
    fromPitches: [...from.pitches],
    toPitches: [...to.pitches],
    gentler,
  };
}

/** A tune in `to`, with its retune from `from` where that is another tuning. */
export function tune(
  position: number,
  title: string | null,
  to: string,
  from = to,
  more: Partial<FollowTune> & { readonly kind?: string } = {},
): FollowTune {
  const { kind: kindId = 'fiddle', ...fields } = more;
  const kind = builtInKind(kindId);
  if (!kind) throw new Error(kindId);
  const { pitches, capo } = read(kindId, to);
  return {
    entryId: `e${position}`,
    title,
    open: title === null,
    key: 'A',
    mode: 'major',
    rhythm: 'reel',
    minutes: title === null ? 40 : null,
    tuning: showTuning(kind, pitches),
    capo,
    pitches: [...pitches],
    retune: from === to ? null : move(kindId, from, to),
    set: 'First set',
    position,
    ...fields,
  };
}

export function follow(parts: Partial<Follow> = {}): Follow {
  return {
    version: 1,
    status: 'live',
    title: 'Thursday at the Old Mill',
    kind: 'fiddle',
    kinds: ['fiddle', 'banjo'],
    referenceA: 440,
    startsAt: '2027-01-14T18:30:00.000Z',
    timeZone: 'Europe/Berlin',
    total: 16,
    followUrl: 'https://tunes.example.org/f/QGQE34ES',
    now: { ...tune(5, 'Millrace Waltz', 'ADAE', 'ADAE', { key: 'D', rhythm: 'waltz' }), phase: 'playing' },
    next: tune(6, 'Cluck Old Hen', 'AEAE', 'ADAE', { mode: 'modal' }),
    later: [
      tune(7, 'June Apple', 'AEAE', 'AEAE', { mode: 'mixolydian' }),
      tune(8, 'Lantern Hill', 'AEAC#', 'AEAE'),
    ],
    retuneIn: 1,
    ...parts,
  };
}
