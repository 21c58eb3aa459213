/** A stream of numbers that depends on its seed alone, so that a demo picture has the same bytes each time it is made. */
export interface SeededRandom {
  /** Uniform in [0, 1). */
  next(): number;
  /** Uniform in [least, most). */
  between(least: number, most: number): number;
  /** Standard normal deviate, cut at about ±3.46 (sum of uniforms: quick, and exact in every JavaScript engine). */
  normal(): number;
}

/**
 * Starts a stream. The generator is a 32-bit mix of a Weyl sequence: plenty for picture noise, unfit for secrets.
 * It needs no Math.log or Math.sin, whose last bit may differ between JavaScript engines.
 */
export function randomFrom(seed: number): SeededRandom {
  let state = seed >>> 0;
  const word = (): number => {
    state = (state + 0x9e3779b9) >>> 0;
    let mixed = state;
    mixed = Math.imul(mixed ^ (mixed >>> 16), 0x21f0aaad);
    mixed = Math.imul(mixed ^ (mixed >>> 15), 0x735a2d97);
    return (mixed ^ (mixed >>> 15)) >>> 0;
  };
  const next = (): number => word() / 4294967296;
  // Six 16-bit uniforms have variance 6/12; the factor makes it 1 (65536 steps, so the -0.5 centres them).
  const scale = Math.SQRT2 / 65536;
  return {
    next,
    between: (least, most) => least + (most - least) * next(),
    normal: () => {
      const first = word();
      const second = word();
      const third = word();
      const sum =
        (first & 0xffff) + (first >>> 16) + (second & 0xffff) + (second >>> 16) + (third & 0xffff) + (third >>> 16) - 3 * 65535;
      return sum * scale;
    },
  };
}

/** A seed of its own for each named purpose (FNV-1a), so that adding noise to one thing leaves the others as they were. */
export function seedFrom(...parts: readonly (string | number)[]): number {
  let hash = 0x811c9dc5;
  for (const character of parts.join('\u0000')) {
    hash = Math.imul(hash ^ (character.codePointAt(0) ?? 0), 0x01000193) >>> 0;
  }
  return hash;
}
