import type { NextFunction, Request, Response } from 'express';
import type { Pool } from 'pg';
import { collectDefaultMetrics, Gauge, Histogram, Registry } from 'prom-client';

/** Seconds: what a phone meets, a page, an order, and what nobody should meet. */
const BUCKETS = [0.005, 0.02, 0.05, 0.1, 0.25, 0.5, 1, 2, 5];

/** Figures for whoever runs the server, in Prometheus' text format. Of people they tell nothing. */
export class Metrics {
  readonly registry = new Registry();
  private readonly answers = new Histogram({
    name: 'pegwell_answer_seconds',
    help: 'Time from a request to the end of its answer.',
    labelNames: ['method', 'route', 'status'],
    buckets: BUCKETS,
    registers: [this.registry],
  });

  constructor(pool: Pool) {
    collectDefaultMetrics({ register: this.registry });
    new Gauge({
      name: 'pegwell_database_connections',
      help: 'Connections to the database, and requests that wait for one.',
      labelNames: ['state'],
      registers: [this.registry],
      collect() {
        this.set({ state: 'open' }, pool.totalCount);
        this.set({ state: 'idle' }, pool.idleCount);
        this.set({ state: 'waited-for' }, pool.waitingCount);
      },
    });
  }

  /** Measures answers by route as it is written in the code: an id or a code in a label would be one too many. */
  readonly measure = (request: Request, response: Response, next: NextFunction): void => {
    const stop = this.answers.startTimer({ method: request.method });
    response.once('finish', () => {
      const route = request.route as { path?: unknown } | undefined;
      stop({ route: typeof route?.path === 'string' ? route.path : 'none', status: response.statusCode });
    });
    next();
  };
}
