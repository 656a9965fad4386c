import { spawn, type ChildProcess } from 'node:child_process';
import { randomBytes } from 'node:crypto';
import { createServer, type AddressInfo } from 'node:net';
import path from 'node:path';
import { Client } from 'pg';

const SERVER = path.join(__dirname, '..', 'server', 'dist', 'main.js');

/** A database of its own on the test run's throwaway cluster. */
export interface SiteDatabase {
  readonly url: string;
  drop(): Promise<void>;
}

/** The built server in production mode, serving the API and the pages, as people run it. */
export interface Site {
  readonly url: string;
  readonly databaseUrl: string;
  stop(): Promise<void>;
  /** Ends the process as a power cut would. */
  kill(): Promise<void>;
}

export async function freshDatabase(): Promise<SiteDatabase> {
  const cluster = process.env['PEGWELL_TEST_DATABASE_URL'];
  if (!cluster) throw new Error('PEGWELL_TEST_DATABASE_URL is missing: run the journeys through npm test.');
  const name = `pegwell_journey_${randomBytes(6).toString('hex')}`;
  await query(cluster, `create database ${name}`);
  const url = new URL(cluster);
  url.pathname = `/${name}`;
  return { url: url.toString(), drop: () => query(cluster, `drop database if exists ${name} with (force)`) };
}

async function query(url: string, statement: string): Promise<void> {
  const client = new Client({ connectionString: url });
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

export interface SiteOptions {
  readonly demo?: boolean;
  /** By default any free one. */
  readonly port?: number;
  /** Where mail goes; without it, none is sent. */
  readonly mailUrl?: string;
  /** Is given all that the server writes, at the level that tells the most. */
  readonly onLog?: (text: string) => void;
}

export async function startSite(databaseUrl: string, options: SiteOptions = {}): Promise<Site> {
  const port = options.port ?? (await freePort());
  const url = `http://127.0.0.1:${port}`;
  const child = spawn(process.execPath, [SERVER], {
    env: {
      PATH: process.env['PATH'],
      NODE_ENV: 'production',
      PORT: String(port),
      PEGWELL_URL: url,
      PEGWELL_LOG: options.onLog ? 'debug' : 'error',
      PEGWELL_SECRET: 'a secret of the journeys, long enough to be one',
      PEGWELL_DEMO: options.demo ? 'yes' : 'no',
      PEGWELL_MAIL_URL: options.mailUrl,
      DATABASE_URL: databaseUrl,
    },
    stdio: ['ignore', options.onLog ? 'pipe' : 'inherit', options.onLog ? 'pipe' : 'inherit'],
  });
  for (const stream of [child.stdout, child.stderr])
    stream?.on('data', (text) => options.onLog?.(String(text)));
  await untilHealthy(url, child);
  return { url, databaseUrl, stop: () => end(child, 'SIGTERM'), kill: () => end(child, 'SIGKILL') };
}

async function untilHealthy(url: string, child: ChildProcess): Promise<void> {
  const deadline = Date.now() + 30_000;
  while (Date.now() < deadline) {
    if (child.exitCode !== null) throw new Error(`the server ended with ${child.exitCode}`);
    const healthy = await fetch(`${url}/api/health`).then(
      (answer) => answer.ok,
      () => false,
    );
    if (healthy) return;
    await new Promise((resolve) => setTimeout(resolve, 50));
  }
  throw new Error('the server does not answer');
}

function end(child: ChildProcess, signal: NodeJS.Signals): Promise<void> {
  if (child.exitCode !== null || child.signalCode !== null) return Promise.resolve();
  return new Promise((resolve) => {
    child.once('exit', () => resolve());
    child.kill(signal);
  });
}

function freePort(): Promise<number> {
  return new Promise((resolve, reject) => {
    const probe = createServer();
    probe.once('error', reject);
    probe.listen(0, '127.0.0.1', () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => resolve(port));
    });
  });
}
