import { ProblemException } from './problem';

/** 429 with `Retry-After`, and in words how long to wait. */
export class TooManyException extends ProblemException {
  /** Seconds. */
  readonly retryAfter: number;

  constructor(words: string, milliseconds: number) {
    const seconds = Math.max(1, Math.ceil(milliseconds / 1000));
    super('too-many', `${words} Wait ${inWords(seconds)}, then try again.`);
    this.retryAfter = seconds;
  }
}

function inWords(seconds: number): string {
  if (seconds < 60) return seconds === 1 ? 'a second' : `${seconds} seconds`;
  const minutes = Math.ceil(seconds / 60);
  if (minutes < 90) return minutes === 1 ? 'a minute' : `${minutes} minutes`;
  return `${Math.ceil(minutes / 60)} hours`;
}
