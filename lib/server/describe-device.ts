const browsers: [RegExp, string][] = [
  [/Edg\//, 'Edge'],
  [/OPR\//, 'Opera'],
  [/Firefox\//, 'Firefox'],
  [/Chrome\//, 'Chrome'],
  [/Safari\//, 'Safari'],
];
const systems: [RegExp, string][] = [
  [/Windows/, 'Windows'],
  [/Android/, 'Android'],
  [/iPhone|iPad/, 'iOS'],
  [/Mac OS X/, 'macOS'],
  [/Linux/, 'Linux'],
];

/** Browser and system in words, so that a person knows their own sessions again. */
export function describeDevice(userAgent: string): string {
  const find = (names: [RegExp, string][]) => names.find(([pattern]) => pattern.test(userAgent))?.[1];
  const browser = find(browsers) ?? 'A browser';
  const system = find(systems);
  return system ? `${browser} on ${system}` : browser;
}
