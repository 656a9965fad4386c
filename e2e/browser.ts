import AxeBuilder from '@axe-core/playwright';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';

/**
 * Debian's Chromium, kept from asking anything of the network.
 * @param more switches of its own
 */
export function startBrowser(more: readonly string[] = []): Promise<Browser> {
  return chromium.launch({
    executablePath: '/usr/bin/chromium',
    headless: true,
    args: [
      '--no-sandbox',
      '--disable-gpu',
      '--disable-quic',
      '--no-first-run',
      '--disable-background-networking',
      '--disable-component-update',
      '--disable-sync',
      ...more,
    ],
  });
}

export const LAPTOP = { width: 1360, height: 900 } as const;
export const PHONE = { width: 390, height: 844 } as const;

export type Light = 'day' | 'lamp';

/** A person's own browser: cookies apart, a window size, the system's light. */
export async function person(
  browser: Browser,
  siteUrl: string,
  viewport: { width: number; height: number } = LAPTOP,
  light: Light = 'day',
): Promise<{ context: BrowserContext; page: Page; foreign: string[] }> {
  const context = await browser.newContext({
    baseURL: siteUrl,
    viewport,
    colorScheme: light === 'lamp' ? 'dark' : 'light',
    locale: 'en-GB',
    timezoneId: 'Europe/Berlin',
  });
  // What the light switch stores: the phone's pages are in lamp unless somebody chose otherwise.
  await context.addInitScript((chosen) => {
    localStorage.setItem('pegwell-light-desk', chosen);
    localStorage.setItem('pegwell-light-phone', chosen);
  }, light);
  context.setDefaultTimeout(20_000);
  const page = await context.newPage();
  const foreign = foreignRequests(page, siteUrl);
  return { context, page, foreign };
}

/** Everything that a page asked of another host: nothing, or the test that looks at it fails. */
function foreignRequests(page: Page, siteUrl: string): string[] {
  const foreign: string[] = [];
  page.on('request', (request) => {
    const url = request.url();
    if (!url.startsWith(siteUrl) && !/^(data|blob|about):/.test(url)) foreign.push(url);
  });
  return foreign;
}

/** What axe calls serious or critical, each with where it stands. */
export async function seriousProblems(page: Page): Promise<string[]> {
  const { violations } = await new AxeBuilder({ page }).analyze();
  return violations
    .filter(({ impact }) => impact === 'serious' || impact === 'critical')
    .flatMap(({ id, nodes }) =>
      nodes.map((node) => `${id} at ${node.target.join(' ')}: ${node.failureSummary}`),
    );
}
