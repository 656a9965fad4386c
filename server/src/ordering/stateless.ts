import type { FieldError } from '@pegwell/shared/contract/errors';
import type { ScoreAnswer, ScoreRequest } from '@pegwell/shared/contract/ordering';
import { DEFAULT_SPACED_RHYTHMS } from '@pegwell/shared/contract/sessions';
import { builtInKind, standardPitches } from '@pegwell/shared/music/instrument';
import { parseTonic } from '@pegwell/shared/music/pitch';
import { showTuning, type Tuned } from '@pegwell/shared/music/tuning';
import type { Evening, EveningTune, Scored } from '@pegwell/shared/session/evening';
import { readChairs, readOpenings } from '@pegwell/shared/session/room';
import { readKindTunings } from '@pegwell/shared/tunes/kind-tunings';
import { cannotBe } from '../common/problem';

/**
 * An evening given in one body, read. Nothing is assumed: a kind on which a tune is silent plays it as
 * it stands; an opening that is omitted is the kind's standard tuning.
 * @throws 422 with every place that cannot be
 */
export function readEvening(body: ScoreRequest): Evening {
  const chairs = readChairs(body.chairs);
  const said = readOpenings(body.openings);
  const errors: FieldError[] = [...chairs.errors, ...said.errors];
  const openings: Record<string, Tuned | null> = Object.fromEntries(
    chairs.chairs.map(({ kind }) => [kind.id, { pitches: standardPitches(kind), capo: 0 }]),
  );
  const tunes = body.tunes.map((tune, index): EveningTune => {
    const { accepted, errors: unread } = readKindTunings(tune.tunings, `tunes.${index}.tunings`);
    errors.push(...unread);
    return {
      id: tune.id,
      tonic: parseTonic(tune.key)?.pitchClass ?? 0,
      rhythm: tune.rhythm ?? null,
      accepted,
    };
  });
  errors.push(...placeErrors(body));
  if (errors.length > 0) throw cannotBe(errors);
  return {
    chairs: chairs.chairs,
    openings: { ...openings, ...said.openings },
    goal: body.goal,
    spacedRhythms: body.spacedRhythms ?? DEFAULT_SPACED_RHYTHMS,
    tunes,
    sets: body.sets,
    medleys: body.medleys ?? [],
  };
}

/** Every tune stands in `sets` once, and rules name tunes that are there. */
function placeErrors(body: ScoreRequest): FieldError[] {
  const errors: FieldError[] = [];
  const labels = new Set<string>();
  body.tunes.forEach(({ id }, index) => {
    if (labels.has(id))
      errors.push({ path: `tunes.${index}.id`, message: `The label ${id} is given twice.` });
    labels.add(id);
  });
  const placed = new Set<string>();
  body.sets.forEach((set, index) => {
    set.forEach((id, place) => {
      const path = `sets.${index}.${place}`;
      if (!labels.has(id)) errors.push({ path, message: `No tune has the label ${id}.` });
      else if (placed.has(id)) errors.push({ path, message: `${id} stands in the sets twice.` });
      placed.add(id);
    });
  });
  body.tunes.forEach(({ id }, index) => {
    if (!placed.has(id)) errors.push({ path: `tunes.${index}.id`, message: `${id} stands in no set.` });
  });
  for (const name of ['medleys', 'befores'] as const) {
    body[name]?.forEach((ids, index) => {
      ids.forEach((id, place) => {
        const path = `${name}.${index}.${place}`;
        if (!labels.has(id)) errors.push({ path, message: `No tune has the label ${id}.` });
        else if (ids.indexOf(id) !== place) errors.push({ path, message: `${id} is named twice.` });
      });
    });
  }
  return errors;
}

/** Places as they cross the wire: tunings as shown, capos apart. */
export function presentPlaces({ score, places }: Scored): ScoreAnswer {
  return {
    score,
    places: places.map(({ before, offClock, pegChanges, kinds }) => ({
      before,
      offClock,
      pegChanges,
      kinds: kinds.map((move) => {
        const kind = builtInKind(move.kind);
        const show = (tuned: Tuned | null) => (kind && tuned ? showTuning(kind, tuned.pitches) : null);
        return {
          kind: move.kind,
          from: show(move.from),
          to: show(move.to),
          capoFrom: move.from?.capo ?? null,
          capoTo: move.to?.capo ?? null,
          deltas: [...move.deltas],
          pegChanges: move.pegChanges,
        };
      }),
    })),
  };
}
