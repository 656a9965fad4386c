import { execFile } from 'node:child_process';
import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { promisify } from 'node:util';
import jsQR from 'jsqr';
import { PNG } from 'pngjs';

const run = promisify(execFile);

/** A PDF as poppler's programs, which had no part in making it, read it. */
export interface ReadPdf {
  readonly pages: number;
  /** Points. */
  readonly size: { readonly width: number; readonly height: number };
  readonly title: string;
  /** In the order in which it was drawn, white space made single; one per page. */
  readonly texts: readonly string[];
  readonly fonts: readonly { readonly name: string; readonly embedded: boolean }[];
}

export function readPdf(bytes: Buffer): Promise<ReadPdf> {
  return withFile(bytes, async (file) => {
    const info = await read('pdfinfo', [file]);
    const of = (name: string) => new RegExp(`^${name}:\\s+(.*)$`, 'm').exec(info)?.[1] ?? '';
    const [width, height] = of('Page size').split(/[ x]+/).map(Number);
    const whole = await read('pdftotext', ['-raw', '-enc', 'UTF-8', file, '-']);
    return {
      pages: Number(of('Pages')),
      size: { width: width ?? NaN, height: height ?? NaN },
      title: of('Title'),
      texts: whole.split('\f').slice(0, -1).map(plain),
      fonts: fontsOf(await read('pdffonts', [file])),
    };
  });
}

/** What a phone reads from the upper half of the first page, null where it finds no code. */
export function scanCode(bytes: Buffer): Promise<string | null> {
  return withFile(bytes, async (file, folder) => {
    const picture = join(folder, 'one');
    const half = ['-r', '100', '-f', '1', '-l', '1', '-x', '0', '-y', '0', '-W', '850', '-H', '550'];
    await run('pdftoppm', [...half, '-gray', '-png', '-singlefile', file, picture]);
    const { data, width, height } = PNG.sync.read(await readFile(`${picture}.png`));
    return jsQR(new Uint8ClampedArray(data), width, height)?.data ?? null;
  });
}

async function withFile<T>(bytes: Buffer, work: (file: string, folder: string) => Promise<T>): Promise<T> {
  const folder = await mkdtemp(join(tmpdir(), 'pegwell-pdf-'));
  try {
    const file = join(folder, 'sheet.pdf');
    await writeFile(file, bytes);
    return await work(file, folder);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

/** White space made single; words that a line's end cut apart at a hyphen stay apart. */
function plain(text: string): string {
  return text.replace(/\s+/g, ' ').trim();
}

async function read(program: string, args: readonly string[]): Promise<string> {
  return (await run(program, [...args], { maxBuffer: 10_000_000 })).stdout;
}

/** `name type encoding emb sub uni object ID`, under two lines of heading. */
function fontsOf(table: string): ReadPdf['fonts'] {
  return table
    .trim()
    .split('\n')
    .slice(2)
    .map((line) => {
      const [embedded] = /\s(yes|no)\s+(?:yes|no)\s+(?:yes|no)\s/.exec(line)?.slice(1) ?? [];
      return { name: line.split(/\s+/)[0] ?? '', embedded: embedded === 'yes' };
    });
}
