import { MAX_ACCEPTED, updateTuneSchema } from '@pegwell/shared/contract/tunes';
import { builtInKind, BUILT_IN_KINDS, type InstrumentKind } from '@pegwell/shared/music/instrument';
import type { Mode } from '@pegwell/shared/music/mode';
import { parseAccepted, type Tuned } from '@pegwell/shared/music/tuning';
import type { Accepted } from '@pegwell/shared/tunes/kind-tunings';
import type { TuneContent } from '../tune-content';
import { findTunings, type FoundTunings } from './found-tunings';

/** The fields of a tune that are plain words, in the order of a file's columns. */
export const WORD_FIELDS = ['title', 'rhythm', 'parts', 'composer', 'source', 'notes'] as const;
export type WordField = (typeof WORD_FIELDS)[number];

/** Something written at a line, counted from 1. */
export interface Written {
  readonly text: string;
  readonly line: number;
}

/** A tune as a reader of files found it, still in the file's words. */
export interface RawTune {
  /** Where it begins. */
  readonly line: number;
  readonly id: string | null;
  readonly words: Partial<Readonly<Record<WordField, Written>>>;
  readonly tonic: string | null;
  readonly mode: Mode | null;
  readonly keyLine: number;
  /** Tunings, by the word that names the kind. */
  readonly cells: readonly (Written & { readonly kind: string })[];
  /** Words outside the tune's own fields that may speak of a tuning. */
  readonly hints?: readonly Written[];
  readonly problems: readonly LineProblem[];
}

export interface LineProblem {
  readonly line: number;
  readonly message: string;
}

/** A tune as a file gives it, understood. What is absent the file does not say. */
export interface FileTune {
  readonly line: number;
  /** As written, for the report; null where there is none. */
  readonly title: string | null;
  readonly id: string | null;
  readonly words: Partial<Omit<TuneContent, 'stated'>>;
  readonly keyLine: number;
  readonly stated: Accepted;
  /** Tunings that its words speak of, for kinds on which `stated` is silent. */
  readonly found: readonly FoundTunings[];
  /** The title without the tuning that was found in brackets at its end; null where none was. */
  readonly plainTitle: string | null;
  /** Any of them keeps the tune out. */
  readonly problems: readonly LineProblem[];
}

/** What a file holds. Problems are those of the file itself: they keep no tune out. */
export interface TuneFile {
  readonly tunes: readonly FileTune[];
  readonly problems: readonly LineProblem[];
}

/** `June Apple (AEAE)` */
const BRACKET_AT_END = /^(.*\S)\s*[([]([^()[\]]{3,60})[)\]]$/s;

/** Characters of a kind's cell: far more than twenty tunings need. */
const LONGEST_CELL = 2_000;
/** More than the longest field holds. */
const LONGEST_TEXT = 10_000;

/** Reads the tunings of a tune, and holds its words to the same limits as a form's. */
export function understandTune(raw: RawTune): FileTune {
  const problems = [...raw.problems];
  const words: { -readonly [Field in keyof FileTune['words']]: FileTune['words'][Field] } = {};
  for (const field of WORD_FIELDS) {
    const written = raw.words[field];
    if (!written || written.text.trim() === '') continue;
    // Cut, it is still too long for any field, and quickly found to be so.
    const parsed = updateTuneSchema.shape[field].safeParse(written.text.slice(0, LONGEST_TEXT));
    if (!parsed.success) problems.push({ line: written.line, message: sentence(parsed.error) });
    else if (typeof parsed.data === 'string') words[field] = parsed.data;
  }
  if (raw.tonic !== null) words.key = raw.tonic;
  if (raw.mode !== null) words.mode = raw.mode;
  const stated: Record<string, readonly Tuned[] | 'any'> = {};
  for (const cell of raw.cells) {
    if (cell.text.trim() === '') continue;
    const read = readCell(cell.kind, cell.text, stated);
    if (typeof read === 'string') problems.push({ line: cell.line, message: read });
    else stated[read.kind.id] = read.accepted;
  }
  const title = raw.words.title?.text.trim().slice(0, LONGEST_CELL) ?? '';
  const { line, id, keyLine } = raw;
  const [, plain = null, bracket = ''] = BRACKET_AT_END.exec(words.title ?? '') ?? [];
  const inTitle = findTunings(bracket);
  const hints = (raw.hints ?? []).flatMap(({ text }) => findTunings(text.slice(0, LONGEST_CELL)));
  const inWords = [words.notes, words.source].flatMap((text) => findTunings(text ?? ''));
  return {
    ...{ line, title: title === '' ? null : title, id, words, keyLine, stated, problems },
    found: firstOfEachKind([...inTitle, ...hints, ...inWords]).filter(
      ({ kind }) => !Object.hasOwn(stated, kind),
    ),
    plainTitle: inTitle.length > 0 ? plain : null,
  };
}

function firstOfEachKind(found: readonly FoundTunings[]): FoundTunings[] {
  return found.filter(({ kind }, at) => found.findIndex((other) => other.kind === kind) === at);
}

function sentence(error: { readonly issues: readonly { readonly message: string }[] }): string {
  return error.issues.map(({ message }) => message).join(' ');
}

/** The sentence that refuses it, or what the kind accepts. */
function readCell(
  name: string,
  text: string,
  stated: Accepted,
): string | { readonly kind: InstrumentKind; readonly accepted: readonly Tuned[] | 'any' } {
  const kind = kindNamed(name);
  if (!kind) return `${name.slice(0, 40)} is no instrument that Pegwell knows.`;
  if (Object.hasOwn(stated, kind.id)) return `${kind.name} is named twice.`;
  if (text.length > LONGEST_CELL) return `${kind.name}: this is too long for tunings.`;
  const accepted = parseAccepted(kind, text);
  if (!accepted.ok) return accepted.reason;
  if (accepted.value.length > MAX_ACCEPTED) return `${kind.name}: at most ${MAX_ACCEPTED} tunings.`;
  return { kind, accepted: accepted.value };
}

/** A kind by its id or name, in any case: `tenor-banjo`, `Tenor Banjo`. */
export function kindNamed(name: string): InstrumentKind | undefined {
  const id = name
    .trim()
    .toLowerCase()
    .replace(/[\s_-]+/g, '-');
  return builtInKind(id) ?? BUILT_IN_KINDS.find((kind) => kind.plural.toLowerCase().replace(' ', '-') === id);
}
