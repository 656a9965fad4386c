import { execFileSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, readFileSync, rmSync, statSync, truncateSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { writeBackup } from '../scripts/backup/backup';
import { connectionTo } from '../scripts/backup/connection';
import { restoreBackup } from '../scripts/backup/restore';
import { findPostgres, type Postgres } from '../scripts/postgres';
import { DEMO_HOST, DEMO_PASSWORD } from '../server/src/demo/people';
import { freshDatabase, startSite, type SiteDatabase } from './site';

describe('what whoever runs the server does', () => {
  const folder = mkdtempSync(path.join(tmpdir(), 'pegwell-operations-'));
  const filesFolder = path.join(folder, 'files');
  const archive = path.join(folder, 'pegwell.tar');
  let postgres: Postgres;
  let database: SiteDatabase;
  const others: SiteDatabase[] = [];
  beforeAll(async () => {
    postgres = await findPostgres('');
    database = await freshDatabase();
    // The demo: a little of everything that is stored.
    await (await startSite(database.url, { demo: true })).stop();
    mkdirSync(path.join(filesFolder, 'deep'), { recursive: true });
    writeFileSync(path.join(filesFolder, 'deep', 'sheet.pdf'), Buffer.from([0, 255, 1, 254]));
    await writeBackup({ databaseUrl: database.url, filesFolder, postgres }, archive);
  });
  afterAll(async () => {
    for (const each of [database, ...others]) await each.drop();
    rmSync(folder, { recursive: true });
  });

  const another = async () => {
    const made = await freshDatabase();
    others.push(made);
    return made.url;
  };
  const emptyFolder = () => mkdtempSync(path.join(folder, 'restored-'));
  /** What PostgreSQL's own program says of a database, sorted: rows lie elsewhere after a restore. */
  const dumpOf = (databaseUrl: string) =>
    execFileSync(path.join(postgres.bin, 'pg_dump'), ['--no-owner', '--no-privileges', '--inserts'], {
      env: connectionTo(databaseUrl),
      maxBuffer: 100_000_000,
    })
      .toString()
      .split('\n')
      // A key of the dump's own, another each time.
      .filter((line) => !/^\\(un)?restrict/.test(line))
      .sort();

  it('backs up and restores: pg_dump tells the same of both, the files are there, people sign in', async () => {
    const place = { databaseUrl: await another(), filesFolder: emptyFolder(), postgres };
    const manifest = await restoreBackup(archive, place);
    expect(Object.keys(manifest.tables).length).toBeGreaterThan(10);
    expect(dumpOf(place.databaseUrl)).toEqual(dumpOf(database.url));
    expect([...readFileSync(path.join(place.filesFolder, 'deep', 'sheet.pdf'))]).toEqual([0, 255, 1, 254]);
    const site = await startSite(place.databaseUrl);
    const answer = await fetch(`${site.url}/api/auth/login`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email: DEMO_HOST.email, password: DEMO_PASSWORD }),
    });
    await site.stop();
    expect(answer.status).toBe(200);
  });

  it('keeps an archive from the eyes of others, and never writes over one', async () => {
    expect(statSync(archive).mode & 0o777).toBe(0o600);
    await expect(writeBackup({ databaseUrl: database.url, filesFolder, postgres }, archive)).rejects.toThrow(
      /is there already/,
    );
  });

  it('restores into an empty place only', async () => {
    const before = dumpOf(database.url);
    await expect(
      restoreBackup(archive, { databaseUrl: database.url, filesFolder: emptyFolder(), postgres }),
    ).rejects.toThrow(/not empty/);
    expect(dumpOf(database.url)).toEqual(before);
    await expect(
      restoreBackup(archive, { databaseUrl: await another(), filesFolder, postgres }),
    ).rejects.toThrow(/not empty/);
  });

  it('takes neither half an archive nor something else for one, and leaves the place empty', async () => {
    const half = path.join(folder, 'half.tar');
    writeFileSync(half, readFileSync(archive));
    truncateSync(half, statSync(archive).size / 2);
    const other = path.join(folder, 'other.tar');
    execFileSync('tar', ['--create', `--file=${other}`, `--directory=${folder}`, 'files']);
    for (const file of [half, other, path.join(folder, 'missing.tar')]) {
      const databaseUrl = await another();
      const place = { databaseUrl, filesFolder: emptyFolder(), postgres };
      await expect(restoreBackup(file, place)).rejects.toThrow(/no whole backup|There is no/);
      expect(dumpOf(databaseUrl).join('')).not.toContain('CREATE TABLE');
    }
  });

  it('makes the first account and lets a lost host in again, by a link that is good once', async () => {
    const site = await startSite(await another());
    const admin = (...words: string[]) =>
      execFileSync(process.execPath, [path.join(__dirname, '..', 'server', 'dist', 'admin.js'), ...words], {
        env: {
          PATH: process.env['PATH'],
          DATABASE_URL: site.databaseUrl,
          PEGWELL_URL: site.url,
          // A link is made from the site's own secret.
          PEGWELL_SECRET: 'a secret of the journeys, long enough to be one',
        },
        stdio: ['ignore', 'pipe', 'pipe'],
      }).toString();
    const post = (word: string, body: object) =>
      fetch(`${site.url}/api/auth/${word}`, {
        method: 'POST',
        headers: { 'content-type': 'application/json' },
        body: JSON.stringify(body),
      });
    const tokenIn = (printed: string) => /\/reset#([\w-]{43})$/m.exec(printed)?.[1] ?? '';
    try {
      const token = tokenIn(admin('account', 'first@example.org', 'The', 'First'));
      expect((await post('reset', { token, password: 'crooked tunes at dusk' })).status).toBe(204);
      expect((await post('reset', { token, password: 'straight tunes at dawn' })).status).toBe(410);
      const signedIn = await post('login', { email: 'first@example.org', password: 'crooked tunes at dusk' });
      expect(await signedIn.json()).toMatchObject({ user: { displayName: 'The First', confirmed: true } });
      const again = tokenIn(admin('reset', 'First@Example.org'));
      expect((await post('reset', { token: again, password: 'straight tunes at dawn' })).status).toBe(204);
      for (const words of [
        ['account', 'first@example.org', 'Again'],
        ['account', 'no address'],
        ['reset', 'nobody@example.org'],
        ['what'],
      ]) {
        expect(() => admin(...words)).toThrow();
      }
    } finally {
      await site.stop();
    }
  });
});
