import type { AddressInfo } from 'node:net';
import { setTimeout as pause } from 'node:timers/promises';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

/** A mail that was caught, decoded. */
export interface CaughtMail {
  readonly messageId: string;
  readonly from: string;
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  /** Lower-case names; one line each, in their order. */
  readonly headers: readonly { readonly name: string; readonly line: string }[];
  readonly at: Date;
}

export interface MailCatcher {
  /** For PEGWELL_MAIL_URL. */
  readonly url: string;
  /** In the order of arrival, the same mail twice if it came twice. */
  readonly mails: readonly CaughtMail[];
  /** The first mail that answers the question, now or when it comes. Fails after `patienceMs`. */
  next(wanted: (mail: CaughtMail) => boolean, patienceMs?: number): Promise<CaughtMail>;
  close(): Promise<void>;
}

interface CatcherOptions {
  /** 0 is any free one. */
  readonly port?: number;
  /** An SMTP status to refuse a recipient with, as real servers do (RFC 5321, section 4.2). */
  readonly refuse?: (address: string) => number | undefined;
  /** Milliseconds that it takes over each mail, as real servers do. */
  readonly slow?: number;
  /** How many are kept; the oldest go. */
  readonly keep?: number;
}

/**
 * A mail server for development and tests: takes what comes, on loopback alone, and passes nothing on.
 */
export async function startMailCatcher({
  port = 0,
  refuse,
  slow = 0,
  keep = Infinity,
}: CatcherOptions = {}): Promise<MailCatcher> {
  const mails: CaughtMail[] = [];
  const waiting = new Set<() => void>();
  const gone = new Set<string>();
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['AUTH', 'STARTTLS'],
    logger: false,
    onClose: ({ id }) => gone.add(id),
    onRcptTo: ({ address }, _session, callback) => {
      const status = refuse?.(address);
      if (status === undefined) callback();
      else callback(Object.assign(new Error('Not here.'), { responseCode: status }));
    },
    onData: (stream, session, callback) => {
      simpleParser(stream).then(
        async (parsed) => {
          await pause(slow);
          // Who does not wait for the answer has not handed it over, and will send it again (RFC 5321, section 4.2.5).
          if (gone.has(session.id)) return;
          mails.push({
            messageId: parsed.messageId ?? '',
            from: parsed.from?.text ?? '',
            to: session.envelope.rcptTo.map(({ address }) => address),
            subject: parsed.subject ?? '',
            text: parsed.text ?? '',
            html: parsed.html || '',
            headers: parsed.headerLines.map(({ key, line }) => ({ name: key, line })),
            at: new Date(),
          });
          if (mails.length > keep) mails.shift();
          for (const look of waiting) look();
          callback();
        },
        (error: unknown) => callback(error as Error),
      );
    },
  });
  // A client that was killed in the middle of a mail is no news.
  server.on('error', () => undefined);
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  const { port: taken } = server.server.address() as AddressInfo;
  return {
    url: `smtp://127.0.0.1:${taken}`,
    mails,
    next: (wanted, patienceMs = 20_000) =>
      new Promise((resolve, reject) => {
        const timer = setTimeout(() => {
          waiting.delete(look);
          reject(new Error(`no such mail came; caught: ${mails.map(({ subject }) => subject).join('; ')}`));
        }, patienceMs);
        const look = () => {
          const found = mails.find(wanted);
          if (!found) return;
          clearTimeout(timer);
          waiting.delete(look);
          resolve(found);
        };
        waiting.add(look);
        look();
      }),
    close: () => new Promise((resolve) => server.close(resolve)),
  };
}

/** The address of a link in a mail: its page, and the token behind the `#`. */
export function linkIn({ text }: CaughtMail): { readonly url: string; readonly token: string } {
  const url = /https?:\/\/\S+#\S+/.exec(text)?.[0];
  if (!url) throw new Error('the mail has no link');
  return { url, token: url.slice(url.indexOf('#') + 1) };
}
