import type { Chair, Evening, KindMove, Place } from '@pegwell/shared/session/evening';

export function moveOfKind(place: Place | undefined, kindId: string): KindMove | undefined {
  return place?.kinds.find(({ kind }) => kind === kindId);
}

/** Whether this kind turns a peg, moves its capo, or takes its first tuning at this place. */
export function moves(move: KindMove): boolean {
  if (!move.to) return false;
  return move.from === null || move.pegChanges > 0 || move.from.capo !== move.to.capo;
}

/** The kinds in the room that change anything this evening, and those that stand all night. */
export function partKinds(
  { chairs }: Pick<Evening, 'chairs'>,
  places: readonly Place[],
): { readonly changing: readonly Chair[]; readonly still: readonly Chair[] } {
  const changes = ({ kind }: Chair) =>
    places.some((place) => {
      const move = moveOfKind(place, kind.id);
      return move !== undefined && moves(move);
    });
  return { changing: chairs.filter(changes), still: chairs.filter((chair) => !changes(chair)) };
}

/** `5 fiddles`, `1 banjo` */
export function chairWords({ kind, count }: Chair): string {
  return `${count} ${(count === 1 ? kind.name : kind.plural).toLowerCase()}`;
}
