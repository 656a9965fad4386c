import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { CACHE, inRoot, installed } from './places';
import { run, type Run } from './run';

export type Workspace = 'shared' | 'server' | 'client';

type Recipe = {
  readonly program: string;
  readonly args: readonly string[];
  /** Files and folders it is made from, below the root. Missing ones count too: they may come. */
  readonly from: readonly string[];
  /** What exists afterwards, below the root. */
  readonly makes: string;
};

const SHARED = ['package-lock.json', 'tsconfig.base.json', 'shared/package.json', 'shared/src'];

const RECIPES: Readonly<Record<Workspace, Recipe>> = {
  shared: {
    program: 'tsc',
    args: ['-p', 'tsconfig.build.json'],
    from: [...SHARED, 'shared/tsconfig.json', 'shared/tsconfig.build.json'],
    makes: 'shared/dist',
  },
  server: {
    program: 'nest',
    args: ['build'],
    from: [
      ...SHARED,
      'server/src',
      'server/nest-cli.json',
      'server/tsconfig.json',
      'server/tsconfig.build.json',
    ],
    makes: 'server/dist/main.js',
  },
  client: {
    program: 'vite',
    args: ['build'],
    from: [...SHARED, 'client/src', 'client/public', 'client/index.html', 'client/vite.config.ts'],
    makes: 'client/dist/index.html',
  },
};

/** Which source each dist was made from: workspace -> fingerprint. */
const BUILT = path.join(CACHE, 'built.json');

function builtFrom(): Readonly<Record<string, string>> {
  try {
    return JSON.parse(readFileSync(BUILT, 'utf8')) as Record<string, string>;
  } catch {
    return {};
  }
}

function writeBuiltFrom(built: Readonly<Record<string, string>>): void {
  mkdirSync(CACHE, { recursive: true });
  writeFileSync(BUILT, `${JSON.stringify(built, null, 2)}\n`);
}

function filesIn(place: string): readonly string[] {
  if (!existsSync(place)) return [];
  if (!statSync(place).isDirectory()) return [place];
  return readdirSync(place)
    .sort()
    .flatMap((name) => filesIn(path.join(place, name)));
}

function fingerprint(workspace: Workspace): string {
  const hash = createHash('sha256');
  for (const from of RECIPES[workspace].from) {
    hash.update(`${from}\0`);
    for (const file of filesIn(inRoot(from))) {
      hash
        .update(`${path.relative(inRoot(), file)}\0`)
        .update(readFileSync(file))
        .update('\0');
    }
  }
  return hash.digest('hex');
}

/** For what writes into dist by another way, as the watchers of development do. */
export function forgetBuild(...workspaces: readonly Workspace[]): void {
  writeBuiltFrom(
    Object.fromEntries(Object.entries(builtFrom()).filter(([name]) => !workspaces.some((w) => w === name))),
  );
}

/**
 * Builds a workspace for production, unless its dist was made from this very source.
 * Shared comes first: the server's build reads it.
 * @returns the program's exit code
 */
export async function build(workspace: Workspace, output: Run['output']): Promise<number> {
  const { program, args, makes } = RECIPES[workspace];
  // Taken before building, so that an edit meanwhile counts as a later one.
  const print = fingerprint(workspace);
  if (existsSync(inRoot(makes)) && builtFrom()[workspace] === print) return 0;
  forgetBuild(workspace);
  // Files whose source is gone would stay importable.
  if (workspace === 'shared') rmSync(inRoot('shared/dist'), { recursive: true, force: true });
  const { code } = await run(installed(program), args, {
    cwd: inRoot(workspace),
    env: { ...process.env, NODE_ENV: 'production' },
    output,
  });
  if (code === 0) writeBuiltFrom({ ...builtFrom(), [workspace]: print });
  return code;
}
