const BROWSERS: readonly (readonly [RegExp, string])[] = [
  [/\bEdgA?\//, 'Edge'],
  [/\bOPR\//, 'Opera'],
  [/\bSamsungBrowser\//, 'Samsung Internet'],
  [/\b(Firefox|FxiOS)\//, 'Firefox'],
  [/\b(Chrome|CriOS|Chromium|HeadlessChrome)\//, 'Chrome'],
  [/\bVersion\/[\d.]+ .*Safari\//, 'Safari'],
];

const SYSTEMS: readonly (readonly [RegExp, string])[] = [
  [/\bAndroid\b/, 'Android'],
  [/\b(iPhone|iPod)\b/, 'an iPhone'],
  [/\biPad\b/, 'an iPad'],
  [/\bWindows\b/, 'Windows'],
  [/\bMac OS X\b/, 'a Mac'],
  [/\bCrOS\b/, 'ChromeOS'],
  [/\bLinux\b/, 'Linux'],
];

/**
 * What a browser says it is, in words that its owner knows again: “Firefox on Windows”. Nothing of
 * what was sent is passed on, so no text of a stranger gets into the list of sessions.
 */
export function deviceOf(userAgent: string | null): string {
  const sent = (userAgent ?? '').slice(0, 500);
  const find = (known: readonly (readonly [RegExp, string])[]) =>
    known.find(([pattern]) => pattern.test(sent))?.[1];
  const browser = find(BROWSERS) ?? 'A browser';
  const system = find(SYSTEMS);
  return system === undefined ? browser : `${browser} on ${system}`;
}
