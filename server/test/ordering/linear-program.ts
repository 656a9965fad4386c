import loadHighs from 'highs';

type Term = readonly [factor: number, name: string];

/** A mixed-integer program as it is written down, in the CPLEX LP format that HiGHS reads. */
export class LinearProgram {
  private readonly costs: Term[] = [];
  private readonly rows: string[] = [];
  private readonly binaries: string[] = [];
  private readonly wholes: string[] = [];

  /** 0 or 1. */
  binary(name: string, cost = 0): string {
    this.binaries.push(name);
    if (cost !== 0) this.costs.push([cost, name]);
    return name;
  }

  /** 0, 1, 2, ... */
  whole(name: string): string {
    this.wholes.push(name);
    return name;
  }

  row(terms: readonly Term[], relation: '<=' | '=', value: number): void {
    // No terms: only 0 = 0 may stand, and needs no row; what cannot be is said of a variable that is 0.
    if (terms.length === 0) {
      if (relation === '=' && value !== 0) this.rows.push(`nothing = ${value}`);
      return;
    }
    this.rows.push(`${sumOf(terms)} ${relation} ${value}`);
  }

  get text(): string {
    return [
      'Minimize',
      ` pegs: ${sumOf([...this.costs, [0, 'nothing']])}`,
      'Subject To',
      ...this.rows.map((row, index) => ` r${index}: ${row}`),
      'Bounds',
      ' nothing = 0',
      'Binaries',
      ...this.binaries.map((name) => ` ${name}`),
      'Generals',
      ...this.wholes.map((name) => ` ${name}`),
      'End',
    ].join('\n');
  }
}

const sumOf = (terms: readonly Term[]): string =>
  terms.map(([factor, name]) => `${factor < 0 ? '-' : '+'} ${Math.abs(factor)} ${name}`).join(' ');

/**
 * HiGHS, compiled to WebAssembly, one thread; its own settings but for the gap at which it ends.
 * @returns the least value of a program whose costs are whole; null where nothing keeps all its rows
 */
export async function startHighs(): Promise<(program: LinearProgram) => number | null> {
  const highs = await loadHighs();
  return ({ text }) => {
    // Costs are whole, so within half of one is within none.
    const answer = highs.solve(text, { output_flag: false, mip_abs_gap: 0.5, mip_rel_gap: 0 });
    if (answer.Status === 'Infeasible') return null;
    if (answer.Status !== 'Optimal') throw new Error(`HiGHS ended with ${answer.Status}`);
    return Math.round(answer.ObjectiveValue);
  };
}
