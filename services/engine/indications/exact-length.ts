import type { Rational } from '../quantity/decimal';

/** A length in whole nanometres (0.001 µm), or an area in whole square nanometres·1e0; integers held exactly in a double. */
export type Nanometres = number;

/** Rounds half to even to a whole number. */
function halfEven(value: number): number {
  const down = Math.floor(value);
  const rest = value - down;
  if (rest < 0.5) return down;
  if (rest > 0.5) return down + 1;
  return down % 2 === 0 ? down : down + 1;
}

/** A length in µm rounded half to even to 0.001 µm, as whole nanometres (rule N6). */
export function roundLength(lengthUm: number): Nanometres {
  return halfEven(lengthUm * 1000);
}

/** An area in µm² rounded half to even to 0.000001 mm² (1 µm²), as whole µm². */
export function roundArea(areaUm2: number): number {
  return halfEven(areaUm2);
}

/** Whole nanometres as an exact rational of µm. */
export function lengthUm(value: Nanometres): Rational {
  return { n: BigInt(value), d: 1000n };
}
