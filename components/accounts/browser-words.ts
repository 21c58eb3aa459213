// In this order: each later one also claims to be the earlier ones.
const browsers = [
  ['Edg', 'Edge'],
  ['Firefox', 'Firefox'],
  ['Chrome', 'Chrome'],
  ['Safari', 'Safari'],
] as const;
const systems = ['Windows', 'Android', 'iPhone', 'iPad', 'Mac OS X', 'Linux'] as const;

/** A User-Agent header in a few words, as in 'Firefox 140, Windows'; what is not a browser is shown as it is, cut at 60 characters. */
export function browserWords(agent: string): string {
  const version = (mark: string) => new RegExp(`${mark}/(\\d+)`).exec(agent)?.[1];
  const browser = browsers.find(([mark]) => version(mark) !== undefined);
  if (!browser) return agent.slice(0, 60) || '–';
  const [mark, name] = browser;
  const words = `${name} ${version(mark) ?? ''}`;
  const system = systems.find((one) => agent.includes(one));
  return system === undefined ? words : `${words}, ${system}`;
}
