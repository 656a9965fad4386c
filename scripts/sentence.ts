/** Something the reader can act on: shown as it is, without a stack, and the command ends with 1. */
export class Sentence extends Error {
  override readonly name = 'Sentence';
}

/** One line to the person at the terminal. */
export function say(line = ''): void {
  process.stdout.write(`${line}\n`);
}
