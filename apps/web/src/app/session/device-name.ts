/** Signs in what a browser says of itself, the most particular first: many claim to be others as well. */
const BROWSERS: readonly [RegExp, string][] = [
  [/Edg(A|iOS)?\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/SamsungBrowser\//, 'Samsung Internet'],
  [/(Firefox|FxiOS)\//, 'Firefox'],
  [/(Chrome|Chromium|CriOS|HeadlessChrome)\//, 'Chrome'],
  [/Version\/[\d.]+.* Safari\//, 'Safari'],
];
const SYSTEMS: readonly [RegExp, string][] = [
  [/Android/, 'Android'],
  [/iPhone/, 'an iPhone'],
  [/iPad/, 'an iPad'],
  [/Windows/, 'Windows'],
  [/Mac OS X|Macintosh/, 'a Mac'],
  [/CrOS/, 'a Chromebook'],
  [/Linux/, 'Linux'],
];

/** "Chrome on Linux" for what a browser says of itself; that itself when nothing in it is known. */
export function deviceName(said: string): string {
  const browser = BROWSERS.find(([sign]) => sign.test(said))?.[1];
  const system = SYSTEMS.find(([sign]) => sign.test(said))?.[1];
  if (browser && system) return `${browser} on ${system}`;
  return browser ?? (said.trim() === '' ? 'an unnamed browser' : said.slice(0, 60));
}
