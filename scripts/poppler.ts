import { installFromDebian } from './debian';
import { run } from './run';

/** The server's tests read the set sheet with these, which had no part in making it. */
const PROGRAMS = ['pdfinfo', 'pdftotext', 'pdffonts', 'pdftoppm'];

async function isThere(): Promise<boolean> {
  const answers = await Promise.all(PROGRAMS.map((program) => run(program, ['-v'])));
  return answers.every(({ code }) => code === 0);
}

/** Debian's readers of PDF, installed when one is missing. */
export async function findPoppler(): Promise<void> {
  if (await isThere()) return;
  await installFromDebian({ what: 'A reader of PDF for the tests (poppler)', packages: ['poppler-utils'] });
}
