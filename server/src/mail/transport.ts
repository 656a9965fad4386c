import { Inject, Injectable } from '@nestjs/common';
import { createTransport, type Transporter } from 'nodemailer';
import { ENV, type Env } from '../env';
import { headerLine, html, plainText, type Letter } from './letter';

/** A mail server that says nothing for so long is away; the mail is tried again. Milliseconds. */
const PATIENCE = {
  connectionTimeout: 10_000,
  greetingTimeout: 10_000,
  dnsTimeout: 10_000,
  socketTimeout: 30_000,
};

/** Speaks SMTP with the server of PEGWELL_MAIL_URL. */
@Injectable()
export class MailTransport {
  private readonly transporter: Transporter | null;
  private readonly host: string;
  private readonly from: string;

  constructor(@Inject(ENV) env: Env) {
    const { hostname } = new URL(env.PEGWELL_URL);
    // An address literal is no host that mail programs like to see.
    this.host = /^[\d.]+$|:/.test(hostname) ? 'localhost' : hostname;
    this.from = env.PEGWELL_MAIL_FROM ?? `pegwell@${this.host}`;
    this.transporter =
      env.PEGWELL_MAIL_URL === undefined
        ? null
        : createTransport({
            url: env.PEGWELL_MAIL_URL,
            ...PATIENCE,
            // Nothing in a letter is a file or an address to be fetched.
            disableFileAccess: true,
            disableUrlAccess: true,
          });
  }

  /** @throws what the mail server or the way to it said */
  async send(mailId: string, letter: Letter): Promise<void> {
    if (!this.transporter) throw new Error('this server sends no mail');
    await this.transporter.sendMail({
      from: { name: 'Pegwell', address: this.from },
      to: { name: '', address: letter.to },
      subject: headerLine(letter.subject),
      text: plainText(letter),
      html: html(letter),
      messageId: `<${mailId}@${this.host}>`,
      // RFC 3834: nobody's holiday notice should answer this.
      headers: { 'Auto-Submitted': 'auto-generated' },
    });
  }
}

/** Whether the mail server said of this very mail that it will never take it (RFC 5321, section 4.2.1: 5yz). */
export function neverTakes(error: unknown): boolean {
  const { code, responseCode } = error as { code?: string; responseCode?: number };
  // A refused sign-in or greeting is 5yz too, but about us: it may be put right.
  const aboutTheMail = code === 'EENVELOPE' || code === 'EMESSAGE';
  return aboutTheMail && responseCode !== undefined && responseCode >= 500;
}
