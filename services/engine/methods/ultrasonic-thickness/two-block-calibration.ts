import { add, compare, divide, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, squareRoot } from '../../quantity/roots';
import { notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

export interface BlockReading {
  readonly thicknessMm: Rational;
  readonly transitUs: Rational;
}

export interface Calibration {
  readonly velocityMmPerUs: Rational;
  readonly zeroUs: Rational;
}

/**
 * Velocity and zero of the instrument from a thin and a thick block: V = 2(x₂ − x₁)/(τ₂ − τ₁), τ₀ = τ₁ − 2·x₁/V.
 * Refuses blocks that are not thin then thick, and a transit that does not grow with the thickness.
 * Source: ASTM E797 (two-block calibration), ISO 16809.
 */
export function calibration(thin: BlockReading, thick: BlockReading): Derived<Calibration> {
  const bad = notAboveZero({ thinBlock: thin.thicknessMm, thickBlock: thick.thicknessMm });
  if (bad) return bad;
  if (compare(thick.thicknessMm, thin.thicknessMm) <= 0) return refused('blocks-not-thin-then-thick');
  if (compare(thick.transitUs, thin.transitUs) <= 0) return refused('transit-does-not-grow');
  const two = ratio(2n);
  const velocityMmPerUs = divide(
    multiply(two, subtract(thick.thicknessMm, thin.thicknessMm)),
    subtract(thick.transitUs, thin.transitUs),
  );
  return derived({
    velocityMmPerUs,
    zeroUs: subtract(thin.transitUs, divide(multiply(two, thin.thicknessMm), velocityMmPerUs)),
  });
}

/** Whether a thickness lies within the two blocks it was calibrated on, their thicknesses included (ASTM E797). */
export function isBracketed(thicknessMm: Rational, thin: BlockReading, thick: BlockReading): boolean {
  return compare(thin.thicknessMm, thicknessMm) <= 0 && compare(thicknessMm, thick.thicknessMm) <= 0;
}

/** What a part or a block is made of, in the words of the plan: `CMSX-4`, `single-crystal-001`. */
export interface BlockMaterial {
  readonly alloy: string;
  readonly grainOrientation: string;
}

function sameWords(a: string, b: string): boolean {
  return a.trim().toLowerCase() === b.trim().toLowerCase();
}

/**
 * Whether a block may calibrate for a part: the same alloy and the same grain orientation, both stated on both.
 * The velocity in columnar and single-crystal nickel varies by some 20 % with direction. Source: ASTM E797, ISO 16809.
 */
export function blockForPart(block: BlockMaterial, part: BlockMaterial): Derived<true> {
  for (const key of ['alloy', 'grainOrientation'] as const) {
    if (block[key].trim() === '') return refused('block-unstated', { what: key });
    if (part[key].trim() === '') return refused('part-unstated', { what: key });
  }
  if (!sameWords(block.alloy, part.alloy)) return refused('block-other-alloy', { block: block.alloy, part: part.alloy });
  if (!sameWords(block.grainOrientation, part.grainOrientation))
    return refused('block-other-orientation', { block: block.grainOrientation, part: part.grainOrientation });
  return derived(true);
}

/** Elastic constants of a cubic crystal in GPa. */
export interface CubicStiffness {
  readonly c11: Rational;
  readonly c12: Rational;
  readonly c44: Rational;
}

/**
 * Velocity in m/s of the longitudinal wave along a direction of a cubic crystal, √(C/ρ): C₁₁ along ⟨001⟩,
 * (C₁₁ + C₁₂ + 2C₄₄)/2 along ⟨011⟩, (C₁₁ + 2C₁₂ + 4C₄₄)/3 along ⟨111⟩. Shows why blocks must share the part's orientation.
 * Source: Christoffel's equation, in any text on elastic waves.
 */
export function crystalVelocityMPerS(
  stiffness: CubicStiffness,
  densityKgPerM3: Rational,
  along: '001' | '011' | '111',
): Derived<Rational> {
  const { c11, c12, c44 } = stiffness;
  const bad = notAboveZero({ c11, c44, density: densityKgPerM3 });
  if (bad) return bad;
  const [times12, times44, share] = ({ '001': [0n, 0n, 1n], '011': [1n, 2n, 2n], '111': [2n, 4n, 3n] } as const)[along];
  const sum = add(c11, add(multiply(ratio(times12), c12), multiply(ratio(times44), c44)));
  const pascals = divide(multiply(sum, exact('1000000000')), ratio(share));
  return notAboveZero({ stiffness: pascals }) ?? derived(squareRoot(divide(pascals, densityKgPerM3)));
}
