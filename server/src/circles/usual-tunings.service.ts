import { Inject, Injectable } from '@nestjs/common';
import type { SetUsualTunings, UsualTuning } from '@pegwell/shared/contract/circles';
import type { FieldError } from '@pegwell/shared/contract/errors';
import type { Mode } from '@pegwell/shared/contract/keys';
import { BUILT_IN_KINDS, builtInKind } from '@pegwell/shared/music/instrument';
import { parseTonic } from '@pegwell/shared/music/pitch';
import { parseTuning, showTuned, type Tuned } from '@pegwell/shared/music/tuning';
import { modeFamily } from '@pegwell/shared/music/mode';
import { builtInUsual } from '@pegwell/shared/music/usual-tunings';
import { announceCircle } from '../common/announce';
import type { Member } from '../common/access';
import { cannotBe } from '../common/problem';
import { DATABASE, type Database, type RootDatabase } from '../database/database';
import { CirclesRepository, type UsualTuningRow } from './circles.repository';
import { HistoryService } from './history.service';

/** What a kind is taken to have where a tune says nothing. */
export type UsualLookup = (kindId: string, key: string, mode: Mode) => Tuned | 'any';

type OwnRow = Pick<UsualTuningRow, 'kind' | 'key' | 'family' | 'pitches' | 'capo'>;

/** The keys that the built-in table names, for showing. */
const SHOWN_KEYS = ['G', 'A', 'D', 'C'] as const;

@Injectable()
export class UsualTuningsService {
  constructor(
    @Inject(DATABASE) private readonly db: RootDatabase,
    private readonly circles: CirclesRepository,
    private readonly history: HistoryService,
  ) {}

  async list(member: Member): Promise<{ items: UsualTuning[] }> {
    return { items: present(await this.circles.usualTunings(this.db, member.circleId)) };
  }

  async replace(member: Member, body: SetUsualTunings): Promise<{ items: UsualTuning[] }> {
    const rows = parseRows(body);
    await this.db.transaction(async (tx) => {
      const before = await this.circles.usualTunings(tx, member.circleId);
      const stored = rows.map((row) => ({ ...row, circleId: member.circleId }));
      await this.circles.replaceUsualTunings(tx, member.circleId, stored);
      await this.history.note(tx, member, {
        what: 'usual-tunings.changed',
        before: present(before),
        after: present(rows),
      });
      await announceCircle(tx, member.circleId);
    });
    return { items: present(rows) };
  }

  /** The circle's own rows first (key and family, then the default), then the built-in table. */
  async lookup(db: Database, circleId: string): Promise<UsualLookup> {
    const rows = await this.circles.usualTunings(db, circleId);
    return remembered((kindId, key, mode) => {
      const tonic = parseTonic(key)?.pitchClass;
      const family = modeFamily(mode);
      const own =
        rows.find((row) => row.kind === kindId && row.family === family && pitchClassOf(row.key) === tonic) ??
        rows.find((row) => row.kind === kindId && row.key === null);
      if (own) return own.pitches === null ? 'any' : { pitches: own.pitches, capo: own.capo };
      return tonic === undefined ? 'any' : builtInUsual(kindId, tonic, mode);
    });
  }
}

/** A library asks for the same few keys thousands of times. */
function remembered(lookup: UsualLookup): UsualLookup {
  const known = new Map<string, Tuned | 'any'>();
  return (kindId, key, mode) => {
    const question = `${kindId} ${key} ${mode}`;
    let answer = known.get(question);
    if (answer === undefined) known.set(question, (answer = lookup(kindId, key, mode)));
    return answer;
  };
}

function pitchClassOf(key: string | null): number | undefined {
  return key === null ? undefined : parseTonic(key)?.pitchClass;
}

function parseRows({ items }: SetUsualTunings): OwnRow[] {
  const errors: FieldError[] = [];
  const seen = new Set<string>();
  const rows = items.flatMap((item, index): OwnRow[] => {
    const at = (field: string, message: string) => {
      errors.push({ path: `items.${index}.${field}`, message });
      return [];
    };
    const kind = builtInKind(item.kind);
    if (!kind) return at('kind', `${item.kind} is no instrument that Pegwell knows.`);
    if ((item.key === null) !== (item.family === null))
      return at('family', 'A key and major or minor go together.');
    const name = `${item.kind} ${pitchClassOf(item.key) ?? ''} ${item.family ?? ''}`;
    if (seen.has(name)) return at('key', 'This key is said twice.');
    seen.add(name);
    const { key, family } = item;
    if (/^any$/i.test(item.tuning.trim())) return [{ kind: kind.id, key, family, pitches: null, capo: 0 }];
    const tuned = parseTuning(kind, item.tuning);
    if (!tuned.ok) return at('tuning', tuned.reason);
    return [{ kind: kind.id, key, family, pitches: [...tuned.value.pitches], capo: tuned.value.capo }];
  });
  if (errors.length > 0) throw cannotBe(errors);
  return rows;
}

/** The built-in table with the circle's own rows laid over it. */
function present(own: readonly OwnRow[]): UsualTuning[] {
  const rows = new Map<string, UsualTuning>();
  const put = (row: UsualTuning) =>
    rows.set(`${row.kind} ${pitchClassOf(row.key) ?? ''} ${row.family ?? ''}`, row);
  for (const kind of BUILT_IN_KINDS) {
    const words = (usual: Tuned | 'any') => (usual === 'any' ? 'any' : showTuned(kind, usual));
    // Where every key has the same, one default row says it all.
    const probe = SHOWN_KEYS.flatMap((key) =>
      (['major', 'minor'] as const).map((family) => ({
        key,
        family,
        tuning: words(builtInUsual(kind.id, parseTonic(key)?.pitchClass ?? 0, family)),
      })),
    );
    const fallback = words(builtInUsual(kind.id, parseTonic('F#')?.pitchClass ?? 6, 'major'));
    put({ kind: kind.id, key: null, family: null, tuning: fallback, own: false });
    for (const row of probe) {
      if (row.tuning !== fallback) put({ kind: kind.id, ...row, own: false });
    }
  }
  for (const row of own) {
    const kind = builtInKind(row.kind);
    if (!kind) continue;
    const tuning = row.pitches === null ? 'any' : showTuned(kind, { pitches: row.pitches, capo: row.capo });
    put({ kind: row.kind, key: row.key, family: row.family, tuning, own: true });
  }
  return [...rows.values()];
}
