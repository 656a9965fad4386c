import { Inject, Injectable } from '@nestjs/common';
import type {
  AcceptSuggestion,
  ScoreAnswer,
  ScoreRequest,
  SessionSuggestion,
  SessionSuggestionRequest,
  SuggestAnswer,
  SuggestRequest,
} from '@pegwell/shared/contract/ordering';
import type { Session } from '@pegwell/shared/contract/sessions';
import { scoreEvening } from '@pegwell/shared/session/score';
import type { Account, Member } from '../common/access';
import { cannotBe, notFound, ProblemException } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { BoardService } from '../sessions/board.service';
import { scoredEvening, type StoredEvening } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { clashSentence, type ClashTold } from './clash-words';
import type { OrderingProblem, Solution } from './engine/ordering-problem';
import { inOrder } from './session-order';
import { problemOf } from './session-problem';
import { Solver, type SolveOptions } from './solver/solver';
import { presentPlaces, readEvening } from './stateless';

/** Milliseconds after which the best so far is answered; the search's own budget of steps ends it before. */
const LIMIT_MS = 5_000;

@Injectable()
export class OrderingService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly solver: Solver,
    private readonly evenings: EveningsService,
    private readonly board: BoardService,
  ) {}

  score(body: ScoreRequest): ScoreAnswer {
    return presentPlaces(scoreEvening(readEvening(body)));
  }

  async suggest(account: Account, body: SuggestRequest, signal: AbortSignal): Promise<SuggestAnswer> {
    const evening = readEvening(body);
    const pins = body.pins ?? {};
    const unknown = Object.keys(pins).filter((id) => !body.tunes.some((tune) => tune.id === id));
    if (unknown.length > 0) {
      throw cannotBe(unknown.map((id) => ({ path: `pins.${id}`, message: `No tune has the label ${id}.` })));
    }
    const problem = { ...evening, pins, befores: body.befores ?? [] };
    const options = { asker: account.id, signal, limitMs: body.limitMs ?? LIMIT_MS };
    const { solution, millis } = await this.solve(problem, options, {
      nameOf: (id) => id,
      placeOf: (id) => pins[id],
      places: body.tunes.length,
    });
    return {
      score: solution.score,
      sets: solution.sets.map((set) => [...set]),
      ...proofOf(solution),
      millis,
    };
  }

  async suggestFor(
    member: Member,
    sessionId: string,
    body: SessionSuggestionRequest,
    signal: AbortSignal,
  ): Promise<SessionSuggestion> {
    const stored = await this.evenings.load(this.db, sessionId);
    if (!stored) throw notFound();
    const goal = body.goal ?? stored.session.goal;
    const { problem, levelsMeant, restore } = problemOf(stored, goal, setOf(stored, body.setId));
    // Places are told as on the whole board, also while the problem is only what is left of it.
    const places = new Map(stored.entries.map(({ id }, index) => [id, index]));
    const options = { asker: member.account.id, signal, limitMs: LIMIT_MS };
    const { solution, millis } = await this.solve(problem, options, {
      nameOf: (id) => stored.entries[places.get(id)!]?.title ?? `number ${places.get(id)! + 1}`,
      placeOf: (id) => places.get(id),
      places: stored.entries.length,
    });
    const sets = restore(solution.sets);
    const after = sets.flat();
    const scoreOf = (evening: StoredEvening) => scoreEvening({ ...scoredEvening(evening), goal }).score;
    return {
      version: stored.session.version,
      before: scoreOf(stored),
      after: scoreOf(inOrder(stored, sets) ?? stored),
      sets,
      moved: stored.entries.flatMap(({ id }, index) => (after[index] === id ? [] : [id])),
      goal,
      ...proofOf(solution, levelsMeant),
      millis,
    };
  }

  accept(member: Member, sessionId: string, body: AcceptSuggestion): Promise<Session> {
    return this.board.reorder(member, sessionId, body);
  }

  private async solve(
    problem: OrderingProblem,
    options: SolveOptions,
    told: ClashTold,
  ): Promise<{ solution: Solution; millis: number }> {
    const begun = performance.now();
    const answer = await this.solver.solve(problem, options);
    const millis = Math.round((performance.now() - begun) * 10) / 10;
    if (answer.outcome === 'solution') return { solution: answer, millis };
    if (answer.outcome === 'undecided') throw new ProblemException('undecided');
    const { clashes } = answer;
    throw new ProblemException('rules-clash', clashSentence(clashes, told), { clashes });
  }
}

function proofOf({ provenLevels, lowerBound, stopped }: Solution, levelsMeant = 7) {
  const proven = Math.min(provenLevels, levelsMeant);
  return {
    ...{ optimal: proven === 7, provenLevels: proven, lowerBound },
    ...(stopped === 'time' && { stopped: 'time' as const }),
  };
}

/** @throws 422 for a set that is not on the board */
function setOf({ sets }: StoredEvening, setId: string | undefined): string | undefined {
  if (setId === undefined || sets.some(({ id }) => id === setId)) return setId;
  throw cannotBe([{ path: 'setId', message: 'This set is not on the board.' }]);
}
