import {
  Inject,
  Injectable,
  Logger,
  type OnApplicationBootstrap,
  type OnApplicationShutdown,
} from '@nestjs/common';
import { Client } from 'pg';
import { FOLLOW_CHANNEL } from '../common/announce';
import { ENV, type Env } from '../env';
import { FollowService } from './follow.service';

/** How soon a lost connection is tried again, and how often a quiet one is asked whether it lives. */
const AGAIN_MS = 3_000;
/** A connection that does not answer within this is taken for lost. */
const PATIENCE_MS = 4_000;

/**
 * One connection of its own that hears what any server process announces. While it is down the memory is
 * empty and every phone's question is read from the database; it is tried again every few seconds.
 */
@Injectable()
export class FollowListener implements OnApplicationBootstrap, OnApplicationShutdown {
  private readonly logger = new Logger('Follow');
  private client: Client | null = null;
  /** The same, once it hears. */
  private listening: Client | null = null;
  private timer: NodeJS.Timeout | null = null;
  private closed = false;

  constructor(
    @Inject(ENV) private readonly env: Env,
    private readonly follow: FollowService,
  ) {}

  async onApplicationBootstrap(): Promise<void> {
    await this.connect();
  }

  async onApplicationShutdown(): Promise<void> {
    this.closed = true;
    if (this.timer) clearTimeout(this.timer);
    const client = this.client;
    this.client = null;
    this.listening = null;
    await client?.end().catch(() => undefined);
  }

  /**
   * Resolves when everything that was committed before has been heard: PostgreSQL sends a listener what is
   * pending before it ends the answer to a query (protocol documentation, asynchronous operations).
   */
  async catchUp(): Promise<void> {
    if (this.listening) await this.ask(this.listening);
  }

  private async connect(): Promise<void> {
    const client = new Client({
      connectionString: this.env.DATABASE_URL,
      application_name: 'pegwell follow',
      connectionTimeoutMillis: PATIENCE_MS,
      query_timeout: PATIENCE_MS,
      keepAlive: true,
    });
    this.client = client;
    client.on('error', () => this.lose(client));
    client.on('end', () => this.lose(client));
    client.on('notification', ({ payload = '' }) => {
      const [sessionId, version] = payload.split(' ');
      if (sessionId) this.follow.memory.heard(sessionId, Number(version));
    });
    try {
      await client.connect();
      await client.query(`listen ${FOLLOW_CHANNEL}`);
      if (this.client !== client) return;
      this.listening = client;
      this.follow.memory.listens();
      this.after(() => this.watch(client));
    } catch {
      this.lose(client);
    }
  }

  /** A connection that was cut somewhere on the way says nothing; only asking tells. */
  private async watch(client: Client): Promise<void> {
    await this.ask(client);
    if (this.client === client) this.after(() => this.watch(client));
  }

  private async ask(client: Client): Promise<void> {
    try {
      await client.query('select 1');
    } catch {
      this.lose(client);
    }
  }

  private lose(client: Client): void {
    if (this.client !== client) return;
    this.client = null;
    this.listening = null;
    this.follow.memory.lost();
    if (!this.closed) {
      this.logger.warn('changes are not heard; phones are answered from the database');
      this.after(() => this.connect());
    }
    client.end().catch(() => undefined);
  }

  private after(work: () => Promise<void>): void {
    if (this.closed) return;
    if (this.timer) clearTimeout(this.timer);
    this.timer = setTimeout(() => void work(), AGAIN_MS);
    // A process that has nothing else to do may end.
    this.timer.unref();
  }
}
