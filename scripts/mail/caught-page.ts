import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import type { CaughtMail, MailCatcher } from './catcher';

/** Nothing in a mail may run, or ask for anything. */
const POLICY = "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'; base-uri 'none'";

/** Serves, on loopback, a page that shows what was caught. For development alone: no part of the site. */
export async function serveCaughtMail(catcher: MailCatcher, port: number): Promise<Server> {
  const server = createServer((request, response) => answer(catcher, request, response));
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, '127.0.0.1', resolve);
  });
  return server;
}

function answer({ mails }: MailCatcher, { url = '/' }: IncomingMessage, response: ServerResponse): void {
  response.setHeader('Content-Type', 'text/html; charset=utf-8');
  response.setHeader('Cache-Control', 'no-store');
  response.setHeader('Content-Security-Policy', POLICY);
  const [, number, part] = /^\/(\d+)(\/html)?$/.exec(url) ?? [];
  const mail = number === undefined ? undefined : mails[Number(number)];
  if (mail && part) response.end(mail.html);
  else if (mail) response.end(mailPage(mail, Number(number)));
  else if (url === '/') response.end(listPage(mails));
  else response.writeHead(404).end(page('Nothing here', '<p><a href="/">All mail</a></p>'));
}

function listPage(mails: readonly CaughtMail[]): string {
  const rows = mails.map(
    ({ at, to, subject }, number) =>
      `<li><a href="/${number}">${escaped(subject)}</a> to ${escaped(to.join(', '))}, ${at.toLocaleTimeString('en-GB')}</li>`,
  );
  const list =
    rows.length > 0 ? `<ol>${rows.reverse().join('')}</ol>` : '<p>None yet. Load the page again to look.</p>';
  return page(
    'Mail that was caught',
    `<p>It went to nobody, and is forgotten when development stops.</p>${list}`,
  );
}

/** Links in the plain text can be pressed; the HTML stands in a frame where nothing can. */
function mailPage(mail: CaughtMail, number: number): string {
  const text = escaped(mail.text).replace(/https?:\/\/[^\s<]+/g, (url) => `<a href="${url}">${url}</a>`);
  return page(
    mail.subject,
    `<p><a href="/">All mail</a></p>
<p>From ${escaped(mail.from)}<br>To ${escaped(mail.to.join(', '))}<br>${escaped(mail.messageId)}</p>
<h2>Plain text</h2><pre>${text}</pre>
<h2>HTML</h2><iframe sandbox title="The mail as HTML" src="/${number}/html"></iframe>`,
  );
}

function page(title: string, body: string): string {
  return `<!doctype html><html lang="en"><head><meta charset="utf-8">
<meta name="viewport" content="width=device-width"><title>${escaped(title)}</title>
<style>body{max-width:46rem;margin:auto;padding:20px;font:16px/1.5 system-ui;color:#231b15;background:#f6f0e4}
li{padding:6px 0}a{color:#8c3a1a}pre{white-space:pre-wrap;overflow-wrap:anywhere;background:#fffcf5;padding:14px}
iframe{width:100%;height:420px;border:1px solid #6a5a4c;background:#fff}</style></head>
<body><h1>${escaped(title)}</h1>${body}</body></html>`;
}

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => `&#${sign.charCodeAt(0)};`);
}
