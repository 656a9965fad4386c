import type { Evening, KindMove, Place, Score, Scored } from './evening';
import { bestChoices } from './choices';
import { fewestPegs, kindPaths } from './kind-paths';
import { levelsOf } from './levels';
import { placesOf } from './running-order';

export { compareScores } from './levels';

/**
 * What an order costs, place by place: the plain reference that board, server, phone and sheet share, and
 * that faster reckonings are held to. Where tunes accept several tunings, the score is that of the best
 * choice of all kinds at all places together; of equal choices, the lexicographically smallest list of
 * accepted-list positions in playing order, then by kind id.
 *
 * @param evening parsed and checked; see {@link Evening}. A kind without an opening arrives in standard.
 * @throws RangeError where `sets` names an id that no tune has, or a tuning has the wrong number of strings.
 */
export function scoreEvening(evening: Evening): Scored {
  const places = placesOf(evening);
  const order = levelsOf(evening.goal);
  const chairs = evening.chairs
    .filter(({ count }) => count > 0)
    .sort((a, b) => (a.kind.id < b.kind.id ? -1 : 1));
  const open = chairs.map((chair) => kindPaths(evening, chair, places));
  // Pegs add up over kinds, so where they come first each kind keeps to its own fewest.
  const kinds = evening.goal === 'pegs' ? open.map(fewestPegs) : open;
  const choices = kinds.length === 0 ? places.map(() => []) : bestChoices(kinds, places, order);

  const score = {
    pegChanges: 0,
    retuneStops: 0,
    ruleBreaks: 0,
    secondChoices: 0,
    capoMoves: 0,
    keyChanges: 0,
    semitones: 0,
    offClockPegChanges: 0,
  } satisfies Score;
  const before = kinds.map(() => 0);
  const scoredPlaces = places.map(({ tune, offClock, inMedley, spacedPair, keyChange }, index): Place => {
    const taken = kinds.map(({ steps }, k) =>
      steps[index]![before[k]!]!.find(({ to }) => to === choices[index]![k])!,
    );
    const moves = kinds.map(({ kind, stands }, k): KindMove => {
      const step = taken[k]!;
      const from = stands[index]![before[k]!]!;
      const to = stands[index + 1]![step.to]!;
      return { kind: kind.id, from: from.tuned, to: to.tuned, ...step.perChair, choice: to.position };
    });
    for (const [k, step] of taken.entries()) {
      before[k] = step.to;
      score.secondChoices += step.second;
      score.capoMoves += step.capo;
      score.semitones += step.semitones;
    }
    const pegChanges = taken.reduce((sum, { pegs }) => sum + pegs, 0);
    score.pegChanges += pegChanges;
    if (offClock) score.offClockPegChanges += pegChanges;
    else if (taken.some(({ turns }) => turns)) score.retuneStops += 1;
    if (spacedPair) score.ruleBreaks += 1;
    if (inMedley && taken.some((step) => step.changes)) score.ruleBreaks += 1;
    if (keyChange) score.keyChanges += 1;
    return { before: tune.id, offClock, pegChanges, kinds: moves };
  });
  return { score, places: scoredPlaces };
}
