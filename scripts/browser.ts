import { accessSync, constants } from 'node:fs';
import { installFromDebian } from './debian';

const CHROMIUM = '/usr/bin/chromium';

function isThere(): boolean {
  try {
    accessSync(CHROMIUM, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/** Debian's Chromium, installed when it is missing. */
export async function findBrowser(): Promise<string> {
  if (!isThere()) await installFromDebian({ what: 'Chromium', packages: ['chromium'] });
  return CHROMIUM;
}
