import { DEMO_HOST, DEMO_PASSWORD, DEMO_PEOPLE } from '../server/src/demo/people';
import { say } from './sentence';

/** Prints the demo's sign-ins, one for each role, when they really open this site. */
export async function showDemoSignIns(address: string): Promise<void> {
  if (!(await opens(address))) return;
  say(`Demo sign-ins, all with the password: ${DEMO_PASSWORD}`);
  for (const role of ['host', 'cohost', 'player'] as const) {
    const person = DEMO_PEOPLE.find((one) => one.role === role);
    if (person) say(`  ${role.padEnd(7)}${person.email.padEnd(26)}${person.name}`);
  }
}

/** Signs the demo's host in, and out again at once. */
async function opens(address: string): Promise<boolean> {
  try {
    const signedIn = await fetch(`${address}/api/auth/login`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email: DEMO_HOST.email, password: DEMO_PASSWORD }),
    });
    if (!signedIn.ok) return false;
    const cookie = signedIn.headers
      .getSetCookie()
      .map((one) => one.split(';')[0])
      .join('; ');
    await fetch(`${address}/api/auth/logout`, { method: 'POST', headers: { cookie } });
    return true;
  } catch {
    return false;
  }
}
