import { addFlaw } from './flaws-in-metal';
import {
  addStrokes,
  addWires,
  indicatorStrokes,
  type IndicatorSettings,
  type PlacedWire,
  placeWires,
} from './image-quality-wires';
import type { KnownFlaw, RadiographicFlaw } from './known-flaws';
import { letterStrokes } from './lead-letters';
import { type DemoPartNumber, type DemoView, partForm } from './part-forms';
import { formSeenFrom } from './part-geometry';
import { blurred, clouds, type PixelGrid } from './pixel-grid';
import { randomFrom, seedFrom } from './seeded-random';
import { type ThicknessMap, thicknessMap } from './thickness-map';

/** What a demo radiograph is made of. Places are whole micrometres on the part's view, which is the picture's frame. */
export interface RadiographSettings {
  readonly partNumber: DemoPartNumber;
  readonly view: DemoView;
  /** Spelt in lead letters under the part, so that picture and record can be matched by eye. */
  readonly serial: string;
  readonly seed: number;
  /** 50 gives 1400 × 1000 pixels, 100 gives 700 × 500. */
  readonly pixelPitchUm: number;
  readonly flaws: readonly RadiographicFlaw[];
  /** Left out: seven wires W10 to W16 at the part's usual place. `null`: a picture without an indicator. */
  readonly indicator?: IndicatorSettings | null;
  /** Quanta counted per pixel in the open beam; signal-to-noise ratio there is its root. 20 000 when not given. */
  readonly quantaPerPixel?: number;
  /** Standard deviation of geometric and detector blur together; 55 µm when not given. */
  readonly blurUm?: number;
}

/** Linear grey values (more radiation is a higher value), row 0 at the top, with the truth about what is in them. */
export interface DemoRadiograph {
  readonly pixels: Uint16Array;
  readonly width: number;
  readonly height: number;
  readonly pixelPitchUm: number;
  readonly truth: readonly KnownFlaw[];
  readonly wires: readonly PlacedWire[];
}

// Effective attenuation of a nickel alloy in a filtered beam of about 200 kV, and the share of scatter that reaches the detector.
const attenuationPerUm = 0.155e-3;
const scatter = 0.025;
const openBeam = 54_000;
const letterCellUm = 360;
const letterDepthUm = 14_000;

function usualIndicator(at: readonly [number, number], view: DemoView, levelSpan: boolean): IndicatorSettings {
  const lengthUm = 11_000;
  // Seen from the other side the free end of the wires points the other way, unless the part is mirrored up and down.
  const flipped = view === 'convex' && !levelSpan;
  return {
    wires: ['W10', 'W11', 'W12', 'W13', 'W14', 'W15', 'W16'],
    at: flipped ? [at[0] - lengthUm, at[1]] : [at[0], view === 'convex' ? at[1] - 12_000 : at[1]],
    lengthUm,
    spacingUm: 2_000,
  };
}

function addLetters(map: ThicknessMap, settings: RadiographSettings, indicator: IndicatorSettings | null): void {
  const name = `${settings.partNumber} ${settings.serial}`;
  const strokes = [
    ...letterStrokes(name, [5_000, 1_200], letterCellUm),
    ...letterStrokes(settings.view === 'concave' ? 'CC' : 'CX', [61_500, 1_200], letterCellUm),
    ...(indicator === null ? [] : indicatorStrokes(indicator, 200)),
  ];
  addStrokes(map.metal, strokes, 0.8 * letterCellUm, letterDepthUm, settings.pixelPitchUm);
}

/** Grain and casting skin: the attenuation of a cast alloy is never quite even. */
function addMottle(map: ThicknessMap, seed: number, pitchUm: number): void {
  const { metal } = map;
  const fine = clouds(metal.width, metal.height, 350 / pitchUm, randomFrom(seedFrom(seed, 'grain')));
  const broad = clouds(metal.width, metal.height, 6_000 / pitchUm, randomFrom(seedFrom(seed, 'wall')));
  for (let at = 0; at < metal.values.length; at += 1) {
    metal.values[at] = (metal.values[at] ?? 0) * (1 + 0.004 * (fine.values[at] ?? 0) + 0.012 * (broad.values[at] ?? 0));
  }
}

function transmitted(metal: PixelGrid, blurPx: number): PixelGrid {
  const beam = { ...metal, values: metal.values.map((depth) => Math.exp(-attenuationPerUm * depth)) };
  return blurred(beam, blurPx);
}

function counted(signal: PixelGrid, seed: number, quanta: number): Uint16Array {
  const random = randomFrom(seedFrom(seed, 'quanta'));
  const pixels = new Uint16Array(signal.values.length);
  for (let row = 0; row < signal.height; row += 1) {
    const down = (row - 0.46 * signal.height) / signal.width;
    for (let column = 0; column < signal.width; column += 1) {
      const at = row * signal.width + column;
      const across = column / signal.width - 0.53;
      // The beam is strongest on its axis: an inverse-square and anode-side fall of a few per cent.
      const share = (scatter + (1 - scatter) * (signal.values[at] ?? 0)) * (1 - 0.09 * (across * across + down * down));
      const noisy = share + Math.sqrt(share / quanta) * random.normal();
      pixels[at] = Math.min(65_535, Math.max(0, Math.round(noisy * openBeam)));
    }
  }
  return pixels;
}

/**
 * A digital radiograph as physics would make it: thickness along the beam, exp(−µt), scatter, blur, counting noise.
 * The same settings give the same pixels.
 * @throws RangeError when a flaw is not in whole micrometres, or the serial has a character without a lead letter.
 */
export function radiograph(settings: RadiographSettings): DemoRadiograph {
  const form = formSeenFrom(partForm(settings.partNumber), settings.view);
  const map = thicknessMap(form, settings.pixelPitchUm);
  addMottle(map, settings.seed, settings.pixelPitchUm);
  const truth = settings.flaws.map((flaw, place) =>
    addFlaw(map, flaw, settings.view, settings.pixelPitchUm, seedFrom(settings.seed, 'flaw', place)),
  );
  const usual = usualIndicator(form.indicatorAt, settings.view, form.airfoils[0]?.spanAxis === 'x');
  const indicator = settings.indicator === undefined ? usual : settings.indicator;
  const wires = indicator === null ? [] : placeWires(indicator);
  addWires(map.metal, wires, settings.pixelPitchUm);
  addLetters(map, settings, indicator);
  const signal = transmitted(map.metal, (settings.blurUm ?? 55) / settings.pixelPitchUm);
  const pixels = counted(signal, settings.seed, settings.quantaPerPixel ?? 20_000);
  return { pixels, width: signal.width, height: signal.height, pixelPitchUm: settings.pixelPitchUm, truth, wires };
}
