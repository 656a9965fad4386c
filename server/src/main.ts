import 'reflect-metadata';
import { createApp } from './app';
import { createPool } from './database/database';
import { migrateDatabase } from './database/migrate';
import { EnvError, parseEnv, type Env } from './env';
import { DemoService } from './demo/demo.service';

async function start(): Promise<void> {
  const env = readEnv();
  const { wasEmpty } = await migrate(env);
  const app = await createApp(env);
  if (env.PEGWELL_DEMO && wasEmpty) await app.get(DemoService).seed();
  await app.listen(env.PORT, env.PEGWELL_HOST);
  process.stdout.write(
    `Pegwell listens on http://${env.PEGWELL_HOST}:${env.PORT}; pages open at ${env.PEGWELL_URL}\n`,
  );
}

function readEnv(): Env {
  try {
    return parseEnv(process.env);
  } catch (error) {
    if (error instanceof EnvError) stop(error.message);
    throw error;
  }
}

async function migrate(env: Env): Promise<{ wasEmpty: boolean }> {
  const pool = createPool(env.DATABASE_URL);
  try {
    return await migrateDatabase(pool);
  } finally {
    await pool.end();
  }
}

function stop(sentence: string): never {
  process.stderr.write(`${sentence}\n`);
  process.exit(1);
}

start().catch((error: unknown) => {
  const { code, message } = error as { code?: string; message?: string };
  if (code === 'EADDRINUSE')
    stop(`Port ${process.env['PORT'] ?? '3001'} is taken by another program. Set PORT to a free one.`);
  stop(message ?? String(error));
});
