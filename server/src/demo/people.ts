// The demo circle's people, all invented. Imports nothing: the start script prints sign-ins from here.

/** Everybody's in the demo circle; it is printed at every start, so it guards nothing. */
export const DEMO_PASSWORD = 'play more tune less';

interface DemoPerson {
  readonly name: string;
  readonly email: string;
  readonly role: 'host' | 'cohost' | 'player';
}

/** `.example` is kept free for examples (RFC 2606, section 2): no mail can reach anybody. */
export const DEMO_HOST = {
  name: 'Odalys Fenwright',
  email: 'odalys@larkfen.example',
  role: 'host',
} as const satisfies DemoPerson;

export const DEMO_PEOPLE: readonly DemoPerson[] = [
  DEMO_HOST,
  { name: 'Bram Tollerose', email: 'bram@larkfen.example', role: 'cohost' },
  { name: 'Ilse Quarrow', email: 'ilse@larkfen.example', role: 'player' },
  { name: 'Corwin Mossgate', email: 'corwin@larkfen.example', role: 'player' },
  { name: 'Neva Thistlemere', email: 'neva@larkfen.example', role: 'player' },
  { name: 'Jóra Sandvelli', email: 'jora@larkfen.example', role: 'player' },
  { name: 'Mabry Underhay', email: 'mabry@larkfen.example', role: 'player' },
];
