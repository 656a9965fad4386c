import type { Response } from 'express';

/** Whoever asked has closed the connection: nobody waits for the answer any more. */
export function goneAway(response: Response): AbortSignal {
  const gone = new AbortController();
  response.once('close', () => {
    if (!response.writableFinished) gone.abort();
  });
  return gone.signal;
}
