/** Order matters: a browser also names those that it descends from. */
const browsers: [RegExp, string][] = [
  [/Edg\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/Firefox\//, 'Firefox'],
  [/HeadlessChrome\/|Chromium\//, 'Chromium'],
  [/Chrome\//, 'Chrome'],
  [/Safari\//, 'Safari'],
];

const systems: [RegExp, string][] = [
  [/iPhone|iPad/, 'iOS'],
  [/Android/, 'Android'],
  [/Windows/, 'Windows'],
  [/Mac OS X/, 'macOS'],
  [/Linux/, 'Linux'],
];

/** "Firefox on Linux", from what a browser calls itself; its own words where they say neither. */
export function deviceWords(userAgent: string): string {
  const browser = nameIn(browsers, userAgent);
  const system = nameIn(systems, userAgent);
  if (browser && system) return `${browser} on ${system}`;
  return (browser ?? system ?? userAgent.slice(0, 60)) || 'Unnamed device';
}

function nameIn(names: [RegExp, string][], userAgent: string): string | undefined {
  return names.find(([pattern]) => pattern.test(userAgent))?.[1];
}
