const browsers: [RegExp, string][] = [
  [/Edg(e|A|iOS)?\//, 'Edge'], [/OPR\/|Opera/, 'Opera'], [/SamsungBrowser\//, 'Samsung Internet'], [/Firefox\/|FxiOS\//, 'Firefox'],
  [/Chrome\/|CriOS\//, 'Chrome'], [/Safari\//, 'Safari'],
];
const systems: [RegExp, string][] = [
  [/iPhone/, 'iPhone'], [/iPad/, 'iPad'], [/Android/, 'Android'], [/Windows/, 'Windows'], [/Mac OS X|Macintosh/, 'Mac'], [/CrOS/, 'Chromebook'], [/Linux|X11/, 'Linux'],
];

const nameOf = (userAgent: string, table: [RegExp, string][]) => table.find(([pattern]) => pattern.test(userAgent))?.[1];

/** Words by which a person knows a session again, from what the browser says of itself: 'Firefox on Linux'. */
export function describeDevice(userAgent: string | undefined): string {
  const browser = nameOf(userAgent ?? '', browsers);
  const system = nameOf(userAgent ?? '', systems);
  if (browser === undefined) {
    return system === undefined ? 'Unknown device' : `Unknown browser on ${system}`;
  }
  return system === undefined ? browser : `${browser} on ${system}`;
}
