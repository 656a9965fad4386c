import { DEMO_HOST, DEMO_PASSWORD, DEMO_PEOPLE } from '../server/src/demo/people';
import { say } from './sentence';

/** Prints the demo's e-mail addresses and password, when they open this site. */
export async function showDemoSignIns(address: string): Promise<void> {
  if (!(await opens(address))) return;
  say(`Demo sign-ins, all with the password "${DEMO_PASSWORD}":`);
  for (const { email, role, name } of onePerRole()) {
    say(`  ${email.padEnd(22)} ${role.padEnd(7)} ${name}`);
  }
}

/** Signs in and, where that works, out again. */
async function opens(address: string): Promise<boolean> {
  try {
    const answer = await fetch(`${address}/api/auth/login`, {
      method: 'POST',
      headers: { 'content-type': 'application/json' },
      body: JSON.stringify({ email: DEMO_HOST.email, password: DEMO_PASSWORD }),
    });
    const cookie = answer.headers
      .getSetCookie()
      .map((line) => line.split(';')[0])
      .join('; ');
    if (answer.ok) await fetch(`${address}/api/auth/logout`, { method: 'POST', headers: { cookie } });
    return answer.ok;
  } catch {
    // Printing sign-ins is a kindness: a site that ends meanwhile says so itself.
    return false;
  }
}

function onePerRole(): typeof DEMO_PEOPLE {
  return DEMO_PEOPLE.filter(
    ({ role }, index) => DEMO_PEOPLE.findIndex((person) => person.role === role) === index,
  );
}
