import { isIPv6 } from 'node:net';

/**
 * What network addresses are counted by: an IPv4 address whole, of an IPv6 address its first 64 bits, which is
 * what one household or server is given (RFC 6177), so that nobody has more tries for having more addresses.
 * @example networkOf('2001:db8::7') // '2001:db8:0:0'
 */
export function networkOf(address: string): string {
  // An IPv4 address on a socket that takes both kinds (RFC 4291, section 2.5.5.2).
  const mapped = /^::ffff:(\d+\.\d+\.\d+\.\d+)$/i.exec(address);
  if (mapped?.[1]) return mapped[1];
  if (!isIPv6(address)) return address;
  const [bare = ''] = address.split('%');
  const [head = '', tail] = bare.split('::');
  const parts = (text: string) => (text === '' ? [] : text.split(':'));
  const left = parts(head);
  const missing = tail === undefined ? 0 : 8 - left.length - parts(tail).length;
  const whole = [...left, ...Array<string>(Math.max(missing, 0)).fill('0'), ...parts(tail ?? '')];
  return whole
    .slice(0, 4)
    .map((part) => Number.parseInt(part, 16).toString(16))
    .join(':');
}
