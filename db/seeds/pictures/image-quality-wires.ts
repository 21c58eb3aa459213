import type { PlaceUm } from './part-forms';
import { letterStrokes, type Stroke } from './lead-letters';
import { boxAround, fromSegment, paintMean } from './shape-raster';
import type { PixelGrid } from './pixel-grid';

/** Wire diameters in micrometres. Source: ISO 19232-1, table of wire numbers. */
export const wireDiameterUm = {
  W6: 1000,
  W7: 800,
  W8: 630,
  W9: 500,
  W10: 400,
  W11: 320,
  W12: 250,
  W13: 200,
  W14: 160,
  W15: 125,
  W16: 100,
  W17: 80,
  W18: 63,
  W19: 50,
} as const;
export type WireNumber = keyof typeof wireDiameterUm;

/** A wire as it lies on the picture. */
export interface PlacedWire {
  readonly wire: WireNumber;
  readonly diameterUm: number;
  readonly from: PlaceUm;
  readonly to: PlaceUm;
}

/** Indicator of nickel wires, thickest first, lying level from `at` upwards. */
export interface IndicatorSettings {
  readonly wires: readonly WireNumber[];
  readonly at: PlaceUm;
  readonly lengthUm: number;
  readonly spacingUm: number;
}

/** Where each wire of an indicator lies. */
export function placeWires(indicator: IndicatorSettings): PlacedWire[] {
  return indicator.wires.map((wire, place) => {
    const yUm = indicator.at[1] + place * indicator.spacingUm;
    return {
      wire,
      diameterUm: wireDiameterUm[wire],
      from: [indicator.at[0], yUm],
      to: [indicator.at[0] + indicator.lengthUm, yUm],
    };
  });
}

// Area of a circle's part below a level line through it, per unit length of wire: the integral of its chord.
function chordIntegral(radius: number, at: number): number {
  const held = Math.min(radius, Math.max(-radius, at));
  return held * Math.sqrt(radius * radius - held * held) + radius * radius * Math.asin(held / radius);
}

/** Lays level wires of the alloy's attenuation over the part. The mean over each pixel is exact, so thin wires keep their mass. */
export function addWires(metal: PixelGrid, wires: readonly PlacedWire[], pitchUm: number): void {
  for (const wire of wires) {
    const radius = wire.diameterUm / 2;
    const box = boxAround([wire.from, wire.to], radius);
    // One sample a pixel, at its centre: the chord is integrated over the pixel's height.
    const mean = (x: number, y: number): number =>
      x < wire.from[0] || x > wire.to[0]
        ? 0
        : (chordIntegral(radius, y + pitchUm / 2 - wire.from[1]) - chordIntegral(radius, y - pitchUm / 2 - wire.from[1])) /
          pitchUm;
    const widened = { ...box, bottom: box.bottom - pitchUm, top: box.top + pitchUm };
    paintMean(metal, pitchUm, widened, 1, mean, (at, depth) => {
      metal.values[at] = (metal.values[at] ?? 0) + depth;
    });
  }
}

/** Adds lead letters: strokes of a given width, as deep as stated in equivalent alloy; strokes that cross are no deeper. */
export function addStrokes(
  metal: PixelGrid,
  strokes: readonly Stroke[],
  widthUm: number,
  depthUm: number,
  pitchUm: number,
): void {
  const lead = new Map<number, number>();
  for (const [from, to] of strokes) {
    const inside = (x: number, y: number): number => (fromSegment(x, y, from, to).distance <= widthUm / 2 ? depthUm : 0);
    paintMean(metal, pitchUm, boxAround([from, to], widthUm / 2), 2, inside, (at, depth) => {
      lead.set(at, Math.max(lead.get(at) ?? 0, depth));
    });
  }
  for (const [at, depth] of lead) metal.values[at] = (metal.values[at] ?? 0) + depth;
}

/** The lead marks of an indicator: its thickest wire's number and the material (NI), above the wires. */
export function indicatorStrokes(indicator: IndicatorSettings, cellUm: number): Stroke[] {
  const top = indicator.at[1] + indicator.wires.length * indicator.spacingUm;
  const label = `${(indicator.wires[0] ?? 'W10').slice(1)} NI`;
  return letterStrokes(label, [indicator.at[0] + indicator.lengthUm - 5 * 6.4 * cellUm, top], cellUm);
}
