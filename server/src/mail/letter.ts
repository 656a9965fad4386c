/** A mail as its writer sees it. The same words go out as plain text and as HTML. */
export interface Letter {
  /** An address, without a name. */
  readonly to: string;
  readonly subject: string;
  readonly paragraphs: readonly string[];
  /** The one thing to press. */
  readonly link?: { readonly words: string; readonly url: string };
  /** Below the link: what to do when it is not expected. */
  readonly foot?: string;
}

/**
 * One line for a header: line breaks and other controls would begin headers of their own. The mail library folds
 * and encodes; this keeps the promise also where it would not.
 */
export function headerLine(text: string): string {
  return text.replace(/[\p{Cc}\p{Zl}\p{Zp}]+/gu, ' ').trim();
}

export function plainText({ paragraphs, link, foot }: Letter): string {
  const parts = [...paragraphs];
  if (link) parts.push(`${link.words}:\n${link.url}`);
  if (foot) parts.push(foot);
  return `${parts.join('\n\n')}\n`;
}

// Mail programs read no style sheets. Day light's colours, as in client/src/theme/tokens.css.
const PAGE =
  "margin:0;padding:24px;background:#f6f0e4;color:#231b15;font:16px/1.5 'Source Sans 3',system-ui,sans-serif";
const BUTTON =
  'display:inline-block;padding:12px 18px;background:#8c3a1a;color:#fff8ee;border-radius:4px;font-weight:600;text-decoration:none';
const QUIET = 'margin:0 0 16px;color:#6a5a4c;font-size:14px;overflow-wrap:anywhere';

export function html({ subject, paragraphs, link, foot }: Letter): string {
  const body = paragraphs.map((each) => `<p style="margin:0 0 16px">${escaped(each)}</p>`);
  if (link) {
    const url = escaped(link.url);
    body.push(`<p style="margin:0 0 16px"><a href="${url}" style="${BUTTON}">${escaped(link.words)}</a></p>`);
    body.push(`<p style="${QUIET}">Or copy this address: ${url}</p>`);
  }
  if (foot) body.push(`<p style="${QUIET}">${escaped(foot)}</p>`);
  return `<!doctype html>
<html lang="en">
<head><meta charset="utf-8"><title>${escaped(subject)}</title></head>
<body style="${PAGE}"><div style="max-width:560px">
${body.join('\n')}
</div></body>
</html>
`;
}

const ENTITIES: Readonly<Record<string, string>> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};

function escaped(text: string): string {
  return text.replace(/[&<>"']/g, (sign) => ENTITIES[sign] ?? sign);
}
