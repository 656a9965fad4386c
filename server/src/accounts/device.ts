/** What a browser says of itself, the most telling first: nearly all of them also claim to be others. */
const BROWSERS = [
  [/\bEdg(e|A|iOS)?\//, 'Edge'],
  [/\bOPR\//, 'Opera'],
  [/\bSamsungBrowser\//, 'Samsung Internet'],
  [/\b(Firefox|FxiOS)\//, 'Firefox'],
  [/\b(Chrome|Chromium|CriOS|HeadlessChrome)\//, 'Chrome'],
  [/\bVersion\/\S+ .*\bSafari\//, 'Safari'],
] as const;

const SYSTEMS = [
  [/\biPhone\b/, 'an iPhone'],
  [/\biPad\b/, 'an iPad'],
  [/\bAndroid\b/, 'Android'],
  [/\bCrOS\b/, 'a Chromebook'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b|\bMacintosh\b/, 'a Mac'],
  [/\bLinux\b/, 'Linux'],
] as const;

/**
 * A sign-in's device in words.
 * @example deviceOf('Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0') // 'Firefox on Linux'
 */
export function deviceOf(userAgent: string | null): string {
  const browser = BROWSERS.find(([sign]) => sign.test(userAgent ?? ''))?.[1];
  const system = SYSTEMS.find(([sign]) => sign.test(userAgent ?? ''))?.[1];
  if (browser && system) return `${browser} on ${system}`;
  if (browser) return browser;
  return system ? `A program on ${system}` : 'A program';
}
