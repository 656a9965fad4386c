import { run } from './run';

export const isRoot = process.getuid?.() === 0;

/** How this user may run a command as root; null when not at all. */
export async function asRoot(): Promise<readonly string[] | null> {
  if (isRoot) return [];
  if ((await run('sudo', ['-n', 'true'])).code === 0) return ['sudo', '-n'];
  // With somebody at the keyboard sudo may ask for a password.
  const knowsSudo = (await run('sudo', ['-V'])).code === 0;
  return knowsSudo && process.stdin.isTTY ? ['sudo'] : null;
}
