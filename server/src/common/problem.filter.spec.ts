import { Logger, type ArgumentsHost } from '@nestjs/common';
import { ProblemFilter } from './problem.filter';

/** A response that nothing was sent on yet; `closed` where whoever asked has gone. */
function answering(closed: boolean) {
  const sent: string[] = [];
  const response = {
    ...{ headersSent: false, closed },
    status: () => response,
    type: () => response,
    send: (body: string) => sent.push(body),
  };
  const host = { switchToHttp: () => ({ getResponse: () => response }) } as unknown as ArgumentsHost;
  return { host, sent };
}

describe('what nobody expected', () => {
  const called = AbortSignal.abort().reason as Error;
  let logged: jest.SpyInstance;
  beforeEach(() => (logged = jest.spyOn(Logger.prototype, 'error').mockReturnValue(undefined)));
  afterEach(() => logged.mockRestore());

  it('is a plain 500 that is found in the log', () => {
    const { host, sent } = answering(false);
    new ProblemFilter().catch(new Error('a secret'), host);
    expect(JSON.parse(sent[0]!)).toMatchObject({ status: 500, code: 'internal' });
    expect(sent[0]).not.toContain('a secret');
    expect(logged).toHaveBeenCalledTimes(1);
  });

  it('is no fault where the work was called off because whoever asked has gone', () => {
    const { host, sent } = answering(true);
    new ProblemFilter().catch(called, host);
    expect(sent).toEqual([]);
    expect(logged).not.toHaveBeenCalled();
  });

  it('is a fault where somebody still waits, or where it is something else', () => {
    for (const [thrown, closed] of [
      [called, false],
      [new Error('else'), true],
    ] as const) {
      new ProblemFilter().catch(thrown, answering(closed).host);
    }
    expect(logged).toHaveBeenCalledTimes(2);
  });
});
