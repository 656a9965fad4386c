import { Inject, Injectable } from '@nestjs/common';
import type {
  Explanation,
  ExplanationRequest,
  HeldBack,
  HeldBackRequest,
} from '@pegwell/shared/contract/explain';
import { explain } from '@pegwell/shared/session/explain';
import { compareScores, scoreEvening } from '@pegwell/shared/session/score';
import type { Member } from '../common/access';
import { cannotBe, notFound } from '../common/problem';
import { DATABASE, type RootDatabase } from '../database/database';
import { scoredEvening, type StoredEvening } from '../sessions/evening';
import { EveningsService } from '../sessions/evenings.service';
import { relaxations } from './engine/relax';
import { heldBackWords } from './held-back-words';
import { inOrder } from './session-order';
import { problemOf } from './session-problem';
import { Solver } from './solver/solver';

/** For each rule and tune that is left out: a tenth of a second or so, and a safety stop. */
const STEPS_EACH = 400_000;
const LIMIT_MS_EACH = 1_000;
const MOST_TUNES = 40;

/** Why an order scores what it does, and what it would be without one rule or tune. */
@Injectable()
export class ExplainService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly evenings: EveningsService,
    private readonly solver: Solver,
  ) {}

  async explanation(sessionId: string, body: ExplanationRequest): Promise<Explanation> {
    const stored = await this.load(sessionId);
    const ordered = body.sets ? inThisOrder(stored, body.sets) : stored;
    const goal = body.goal ?? stored.session.goal;
    const evening = { ...scoredEvening(ordered), goal };
    const scored = scoreEvening(evening);
    const entries = new Map(ordered.entries.map((entry, index) => [entry.id, { entry, number: index + 1 }]));
    const called = (id: string) => ({ title: titleOf(stored, id), key: entries.get(id)!.entry.key });
    return {
      ...{ version: stored.session.version, goal, score: scored.score },
      places: explain(evening, scored, called).map(({ reasons, ...place }) => ({
        ...place,
        ...{ number: entries.get(place.before)!.number, title: called(place.before).title },
        reasons: [...reasons],
      })),
    };
  }

  /** Solves the evening again without each rule and each tune, one after the other; others come in between. */
  async heldBack(
    member: Member,
    sessionId: string,
    body: HeldBackRequest,
    signal: AbortSignal,
  ): Promise<HeldBack> {
    const begun = performance.now();
    const stored = await this.load(sessionId);
    const goal = body.goal ?? stored.session.goal;
    const { problem, facts } = problemOf(inThisOrder(stored, body.sets), goal, body.setId);
    const than = scoreEvening(problem).score;
    const options = { asker: member.account.id, signal, limitMs: LIMIT_MS_EACH };
    const relaxed = relaxations(problem, facts, MOST_TUNES);
    const items: HeldBack['items'] = [];
    for (const each of relaxed) {
      const { without, alike } = each;
      const answer = await this.solver.solve({ ...each.problem, stepBudget: STEPS_EACH }, options);
      if (answer.outcome !== 'solution') continue;
      const { score, provenLevels } = answer;
      const gains = compareScores(score, than, goal) < 0;
      if (!gains && without.rule === 'tune') continue;
      const said = heldBackWords(without, { score, than, goal, provenLevels }, (id) => titleOf(stored, id));
      items.push({ rule: without.rule, ids: [...without.ids], alike: [...alike], gains, score, ...said });
    }
    items.sort((a, b) => compareScores(a.score, b.score, goal));
    const tunes = relaxed.filter(({ without }) => without.rule === 'tune');
    const tried = tunes.reduce((sum, { alike }) => sum + 1 + alike.length, 0);
    return {
      ...{ version: stored.session.version, goal, score: than, items },
      untried: problem.tunes.filter(({ id }) => !facts.has(id)).length - tried,
      millis: Math.round(performance.now() - begun),
    };
  }

  private async load(sessionId: string): Promise<StoredEvening> {
    const stored = await this.evenings.load(this.db, sessionId);
    if (!stored) throw notFound();
    return stored;
  }
}

function inThisOrder(stored: StoredEvening, sets: readonly (readonly string[])[]): StoredEvening {
  const ordered = inOrder(stored, sets);
  if (ordered) return ordered;
  throw cannotBe([{ path: 'sets', message: 'This is not the board’s own entries in another order.' }]);
}

/** An open place is called by its key. */
function titleOf({ entries }: StoredEvening, id: string): string {
  const entry = entries.find((each) => each.id === id);
  return entry?.title ?? `the ${entry?.key ?? ''} tunes`;
}
