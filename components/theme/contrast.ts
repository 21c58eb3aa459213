/** Relative luminance of `#rrggbb` after WCAG 2.2, 'relative luminance'. Throws on anything else. */
export function relativeLuminance(colour: string): number {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(colour);
  if (!match) throw new Error(`not a colour of the form #rrggbb: ${colour}`);
  const [red = 0, green = 0, blue = 0] = match.slice(1).map((pair) => linearChannel(Number.parseInt(pair, 16) / 255));
  return 0.2126 * red + 0.7152 * green + 0.0722 * blue;
}

function linearChannel(share: number): number {
  return share <= 0.04045 ? share / 12.92 : ((share + 0.055) / 1.055) ** 2.4;
}

/** Contrast ratio of two colours after WCAG 2.2, from 1 to 21. */
export function contrastRatio(one: string, other: string): number {
  const [light, dark] = [relativeLuminance(one), relativeLuminance(other)].sort((a, b) => b - a) as [number, number];
  return (light + 0.05) / (dark + 0.05);
}
