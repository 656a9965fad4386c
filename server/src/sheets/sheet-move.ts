import { cautions, gentlerChoice } from '@pegwell/shared/music/caution';
import type { InstrumentKind } from '@pegwell/shared/music/instrument';
import { noteOf } from '@pegwell/shared/music/pitch';
import { showTuned, showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import { capoWords, retuneWords, turnWords } from '@pegwell/shared/music/words';
import type { KindMove } from '@pegwell/shared/session/evening';
import type { EveningEntry } from '../sessions/evening';
import type { SheetMove, SheetPeg } from './sheet';

const COUNTED = ['none', 'one', 'both', 'three', 'four', 'five', 'six'];

/** What one kind does before a tune; null where neither peg nor capo moves. */
export function sheetMove(
  kind: InstrumentKind,
  players: number,
  entry: EveningEntry,
  { from, to, pegChanges }: KindMove,
): SheetMove | null {
  if (from === null || to === null) return null;
  const turns = pegChanges > 0;
  if (!turns && from.capo === to.capo) return null;
  return {
    who: players === 1 ? kind.name : kind.plural,
    to: { letters: showTuning(kind, to.pitches), capo: to.capo, standing: 'stated' },
    ...(turns ? withPegs(kind, from, to) : { first: '', words: capoWords(from.capo, to.capo), last: '' }),
    cautions: turns ? warnings(kind, from, to, entry.accepted[kind.id] ?? 'any') : [],
    strip: turns ? pegs(kind, from, to) : null,
  };
}

/** In the order of doing it: capo off, pegs, every string checked (one moves the others), capo on. */
function withPegs(kind: InstrumentKind, from: Tuned, to: Tuned): Pick<SheetMove, 'first' | 'words' | 'last'> {
  const off = kind.id === 'banjo' ? 'capo and spike off' : 'capo off';
  const check = `check all ${COUNTED[kind.courses.length] ?? 'strings'}`;
  return {
    first: from.capo > 0 ? off : '',
    words: retuneWords(kind, from.pitches, to.pitches),
    last: to.capo > 0 ? `${check}, ${capoWords(0, to.capo)}` : check,
  };
}

/** Cautions in full; a mere note (come up slowly, from below) stands at the foot of the page for all. */
function warnings(
  kind: InstrumentKind,
  from: Tuned,
  to: Tuned,
  accepted: readonly Tuned[] | 'any',
): readonly string[] {
  const grave = cautions(kind, from.pitches, to.pitches).filter(
    ({ grade, twoGoes }) => grade === 'caution' || grade === 'refused' || twoGoes,
  );
  if (grave.length === 0) return [];
  const gentler = gentlerChoice(kind, from.pitches, to, accepted);
  const instead = gentler ? [`${showTuned(kind, gentler)} raises less, and the tune accepts it.`] : [];
  return [...grave.map(({ sentence }) => sentence), ...instead];
}

function pegs(kind: InstrumentKind, from: Tuned, to: Tuned): readonly SheetPeg[] {
  return kind.courses.map(({ name, pegs }, index) => {
    const [was = '', is = ''] = [from.pitches[index], to.pitches[index]];
    const { direction } = turnWords(kind, index, was, is);
    return {
      name,
      pegs,
      turn: direction === 'stays' ? null : { up: direction === 'up', target: noteOf(is) },
    };
  });
}
