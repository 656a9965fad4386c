import { createServer } from 'node:net';
import { say, Sentence } from './sentence';

const HOST = '127.0.0.1';

/** Whether a server could listen there now. `port` 0 asks the system for any free one. */
function tryPort(port: number, host: string): Promise<number | null> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(null));
    probe.listen({ port, host, exclusive: true }, () => {
      const address = probe.address();
      const found = typeof address === 'object' && address ? address.port : null;
      probe.close(() => resolve(found));
    });
  });
}

export async function isFree(port: number, host = HOST): Promise<boolean> {
  return (await tryPort(port, host)) !== null;
}

export async function anyFreePort(): Promise<number> {
  const port = await tryPort(0, HOST);
  if (port === null) throw new Sentence('No free TCP port is left on this machine.');
  return port;
}

export function parsePort(text: string, name: string): number {
  const port = /^\d{1,5}$/.test(text) ? Number(text) : 0;
  if (port < 1 || port > 65_535) {
    throw new Sentence(`${name} is "${text}"; it must be a port number from 1 to 65535.`);
  }
  return port;
}

type Choice = {
  /** What listens there, as in "the pages". */
  readonly whose: string;
  /** Asked for by the person: this one or none. */
  readonly asked?: { readonly port: number; readonly by: string };
  /** Last time's port, or the usual one. */
  readonly usual: number;
  readonly host?: string;
  /** Ports that are about to be used by another part of this very command. */
  readonly not?: readonly number[];
};

/** The port asked for, or the usual one, or the next free one after it; a taken port is named. */
export async function choosePort({ whose, asked, usual, host, not = [] }: Choice): Promise<number> {
  if (asked) {
    if (await isFree(asked.port, host)) return asked.port;
    throw new Sentence(
      `Port ${asked.port} (${asked.by}) is taken by another program. ` +
        `Stop that program, or choose another port, as in ${asked.by}=${asked.port + 1} ./docker-free-dev.sh`,
    );
  }
  for (let port = usual; port < usual + 100 && port <= 65_535; port++) {
    if (not.includes(port) || !(await isFree(port, host))) continue;
    if (port !== usual) say(`Port ${usual} is taken by another program; ${whose} use ${port}.`);
    return port;
  }
  return anyFreePort();
}
