/** Signs that encodeURIComponent leaves and RFC 8187's attr-char does not have. */
const NOT_ATTR_CHAR = /['()*]/g;

/**
 * `Content-Disposition` of a download (RFC 6266): a plain name for old readers, and the real one as RFC 8187
 * has it. Path separators and what a header cannot carry are replaced.
 * @example contentDisposition('Sheet.pdf') // `attachment; filename="Sheet.pdf"; filename*=UTF-8''Sheet.pdf`
 */
export function contentDisposition(fileName: string, type: 'attachment' | 'inline' = 'attachment'): string {
  const name = fileName
    .replace(/\p{Cs}/gu, '\ufffd')
    .replace(/[\p{Cc}\p{Cf}]+/gu, ' ')
    .replace(/[/\\]/g, '-')
    .trim();
  // RFC 6266 appendix D: no percent sign in the plain form, some readers decode it; quotes would need escapes.
  const plain = name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\u0020-\u007e]|["%\\]/g, '_');
  const encoded = encodeURIComponent(name).replace(
    NOT_ATTR_CHAR,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `${type}; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
