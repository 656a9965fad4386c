import { MODES, type Mode } from '@pegwell/shared/music/mode';
import type { TuneSearch } from '@pegwell/shared/contract/tunes';
import { builtInKind } from '@pegwell/shared/music/instrument';
import { midiOf, parseTonic, spell, type Accidental, type Letter } from '@pegwell/shared/music/pitch';
import { parseTuning, sameTuning } from '@pegwell/shared/music/tuning';
import { titleKey } from '@pegwell/shared/tunes/title-key';
import type { UsualLookup } from '../circles/usual-tunings.service';
import { cannotBe } from '../common/problem';

/** What a kind has to stand in: stated, or assumed where the tune is silent. */
export interface TuningFilter {
  /** Per course every way its pitch can be spelled: tunings are equal when they sound alike. */
  readonly spellings: readonly (readonly string[])[];
  /** Null: any fret will do. */
  readonly capo: number | null;
  /** `key mode` for which the circle's usual tuning is this one. */
  readonly assumedIn: readonly string[];
}

/** A search as the database can answer it. */
export interface TuneFilter {
  /** Part of a title key. */
  readonly search?: string;
  /** Every spelling of the tonic. */
  readonly tonics?: readonly string[];
  readonly mode?: Mode;
  readonly rhythm?: string;
  readonly kind?: string;
  /** For `kind`: one tuning, or `any` in so many words. */
  readonly tuning?: TuningFilter | 'any';
}

const LETTERS: readonly Letter[] = ['C', 'D', 'E', 'F', 'G', 'A', 'B'];
const ACCIDENTALS: readonly Accidental[] = ['', '#', 'b', '##', 'bb'];
/** Tonics as a key can be written: a letter and at most one accidental. */
const TONICS = LETTERS.flatMap((letter) => ['', '#', 'b'].map((sign) => letter + sign));

/**
 * Reads a search.
 * @throws ProblemException (422) for an unknown kind or a tuning that cannot be read
 */
export function readFilter(query: TuneSearch, usual: UsualLookup): TuneFilter {
  const tonic = query.key === undefined ? undefined : parseTonic(query.key)?.pitchClass;
  return {
    ...(query.search !== undefined && { search: titleKey(query.search) }),
    ...(tonic !== undefined && { tonics: TONICS.filter((name) => parseTonic(name)?.pitchClass === tonic) }),
    ...(query.mode !== undefined && { mode: query.mode }),
    ...(query.rhythm !== undefined && { rhythm: query.rhythm }),
    ...(query.kind !== undefined && readKind(query.kind, query.tuning, usual)),
  };
}

function readKind(
  kindId: string,
  text: string | undefined,
  usual: UsualLookup,
): Pick<TuneFilter, 'kind' | 'tuning'> {
  const kind = builtInKind(kindId);
  if (!kind) throw cannotBe([{ path: 'kind', message: `${kindId} is no instrument that Pegwell knows.` }]);
  if (text === undefined) return { kind: kind.id };
  if (/^any$/i.test(text)) return { kind: kind.id, tuning: 'any' };
  const tuned = parseTuning(kind, text);
  if (!tuned.ok) throw cannotBe([{ path: 'tuning', message: tuned.reason }]);
  const { pitches } = tuned.value;
  // Pegs are what is looked for, unless a fret is named: in words, or by a banjo's capo spelling.
  const capo = tuned.value.capo > 0 || /capo/i.test(text) ? tuned.value.capo : null;
  const assumedIn = TONICS.flatMap((key) => MODES.map((mode) => ({ key, mode }))).filter(({ key, mode }) => {
    const standing = usual(kind.id, key, mode);
    return (
      standing !== 'any' && sameTuning(standing.pitches, pitches) && (capo === null || standing.capo === capo)
    );
  });
  return {
    kind: kind.id,
    tuning: {
      spellings: pitches.map(spellingsOf),
      capo,
      assumedIn: assumedIn.map(({ key, mode }) => `${key} ${mode}`),
    },
  };
}

/** @example spellingsOf('C4') // ['C4', 'B#3', 'Dbb4'] in some order */
function spellingsOf(pitch: string): string[] {
  const midi = midiOf(pitch);
  const names: string[] = [];
  for (const letter of LETTERS) {
    for (const accidental of ACCIDENTALS) {
      for (let octave = 0; octave <= 9; octave++) {
        const other = spell(letter, accidental, octave);
        if (other?.midi === midi) names.push(other.name);
      }
    }
  }
  return names;
}
