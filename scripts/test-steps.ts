import path from 'node:path';
import { build, type Workspace } from './build';
import { inRoot, installed } from './places';
import { run } from './run';
import { ONE_FAILED, ONE_PASSED, readReport, type Counts } from './test-report';

export const PARTS = ['lint', 'shared', 'client', 'build', 'server', 'e2e'] as const;
export type Part = (typeof PARTS)[number];

/** What a step is given: where to write, and what the person added to the command. */
export type Bench = {
  readonly log: string;
  readonly report: string;
  readonly env: NodeJS.ProcessEnv;
  /** Words for jest and vitest: names of files. */
  readonly filters: readonly string[];
};

export type Step = {
  readonly name: string;
  readonly part: Part;
  /** Alone on the machine: it uses both cores, or measures time. */
  readonly alone?: boolean;
  /** Steps without whose success this one cannot be tried. */
  readonly after?: readonly string[];
  readonly work: (bench: Bench) => Promise<Counts>;
};

/** A check that is one thing: it passes or it does not. */
function check(name: string, program: string, args: readonly string[]): Step {
  const work = async ({ log, env }: Bench): Promise<Counts> => {
    const { code } = await run(installed(program), args, { cwd: inRoot(), env, output: { file: log } });
    return code === 0 ? ONE_PASSED : ONE_FAILED;
  };
  return { name, part: 'lint', work };
}

function buildStep(workspace: Workspace, after: readonly string[]): Step {
  const work = async ({ log }: Bench): Promise<Counts> =>
    (await build(workspace, { file: log })) === 0 ? ONE_PASSED : ONE_FAILED;
  return { name: `build ${workspace}`, part: 'build', after, work };
}

function vitest(part: Part, folder: string, extra: Partial<Step>, args: readonly string[]): Step {
  const work = async ({ log, report, env, filters }: Bench): Promise<Counts> => {
    const reporters = ['--reporter=default', '--reporter=json', `--outputFile.json=${report}`];
    const { code } = await run(installed('vitest'), ['run', ...args, ...reporters, ...filters], {
      cwd: inRoot(folder),
      env,
      output: { file: log },
    });
    return readReport(report, code);
  };
  return { name: `${part} tests`, part, work, ...extra };
}

const serverTests: Step = {
  name: 'server tests',
  part: 'server',
  alone: true,
  work: async ({ log, report, env, filters }) => {
    const { code } = await run(
      installed('jest'),
      ['--ci', '--json', `--outputFile=${report}`, '--testLocationInResults=false', ...filters],
      { cwd: inRoot('server'), env, output: { file: log } },
    );
    return readReport(report, code);
  },
};

const WORKSPACES = ['shared', 'server', 'client'] as const;

/** Long ones first, so that two lanes end at about the same time. */
export const STEPS: readonly Step[] = [
  buildStep('shared', []),
  check('eslint', 'eslint', ['.', '--max-warnings=0']),
  buildStep('server', ['build shared']),
  buildStep('client', []),
  ...WORKSPACES.map((workspace) => check(`types of ${workspace}`, 'tsc', ['-p', workspace])),
  check('types of scripts', 'tsc', ['-p', '.']),
  vitest('shared', 'shared', {}, ['--maxWorkers=1']),
  vitest('client', 'client', {}, ['--maxWorkers=1']),
  check('import rules', 'depcruise', ['--config', '.dependency-cruiser.cjs', ...sources()]),
  check('formatting', 'prettier', ['--check', '--log-level=warn', '.']),
  serverTests,
  vitest('e2e', '.', { name: 'browser journeys', alone: true, after: ['build server', 'build client'] }, [
    '--config',
    path.join('e2e', 'vitest.config.mts'),
  ]),
];

function sources(): readonly string[] {
  return ['shared/src', 'server/src', 'server/test', 'client/src', 'scripts', 'e2e', 'bench'];
}
