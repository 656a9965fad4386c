import { networkOf } from './network';

describe('the network of an address', () => {
  // Writings of one address: RFC 4291 section 2.2, RFC 5952 section 4.
  it.each([
    ['192.0.2.7', '192.0.2.7'],
    ['::ffff:192.0.2.7', '192.0.2.7'],
    ['2001:db8::7', '2001:db8:0:0'],
    ['2001:0DB8:0:0:1:2:3:4', '2001:db8:0:0'],
    ['2001:db8:1:2:3:4:5:6', '2001:db8:1:2'],
    ['2001:db8:1:2::', '2001:db8:1:2'],
    ['::1', '0:0:0:0'],
    ['fe80::1%eth0', 'fe80:0:0:0'],
    ['', ''],
  ])('%j is counted as %j', (address, network) => {
    expect(networkOf(address)).toBe(network);
  });
});
