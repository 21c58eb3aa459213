import { type DemoPartNumber, type DemoView, frameUm, partForm, type PlaceUm } from './part-forms';
import { formSeenFrom } from './part-geometry';
import { checkShape, type KnownFlaw, type MarkShape } from './known-flaws';
import { letterStrokes } from './lead-letters';
import type { ColourPicture } from './picture-files';
import { blurred, clouds, type PixelGrid, widelyBlurred } from './pixel-grid';
import { randomFrom, seedFrom, type SeededRandom } from './seeded-random';
import { boxAround, frameGrid, fromSegment, paintMean } from './shape-raster';
import { thicknessMap } from './thickness-map';

/** A place where penetrant bleeds out. Sizes are those of the bleed-out as it is seen, in whole micrometres. */
export interface PenetrantIndication {
  readonly type: 'gas-pore' | 'crack';
  readonly shape: MarkShape;
  /** 1 is a strong indication; 0.3 a faint one. */
  readonly brightness: number;
}

export interface PenetrantSettings {
  readonly partNumber: DemoPartNumber;
  readonly view: DemoView;
  readonly serial: string;
  readonly seed: number;
  /** Micrometres per pixel; 50 gives 1400 × 1000 pixels. */
  readonly pixelPitchUm: number;
  readonly indications: readonly PenetrantIndication[];
  /** 0 well rinsed, 1 heavy background. 0.35 when not given. */
  readonly background?: number;
}

/** A photograph whose frame is the part's view, with the truth about what bleeds out in it. */
export interface DemoPhotograph extends ColourPicture {
  readonly pixelPitchUm: number;
  readonly truth: readonly KnownFlaw[];
}

/** Linear light: penetrant's yellow-green glow, and the violet of the lamp that the camera still sees. */
interface Light {
  readonly glow: PixelGrid;
  readonly lamp: PixelGrid;
}

// Share of one bleed-out's glow at a distance from its outline: full inside, gone a little way out.
function edge(outsideUm: number, softUm: number): number {
  const share = Math.min(1, Math.max(0, 0.5 - outsideUm / softUm));
  return share * share * (3 - 2 * share);
}

function addRounded(
  glow: PixelGrid,
  center: PlaceUm,
  axesUm: readonly [number, number],
  angle: number,
  brightness: number,
  pitchUm: number,
): void {
  const turn = (angle * Math.PI) / 180;
  const least = Math.min(...axesUm) / 2;
  const light = (x: number, y: number): number => {
    const [dx, dy] = [x - center[0], y - center[1]];
    const along = (dx * Math.cos(turn) + dy * Math.sin(turn)) / (axesUm[0] / 2);
    const across = (dy * Math.cos(turn) - dx * Math.sin(turn)) / (axesUm[1] / 2);
    const out = Math.hypot(along, across);
    return brightness * edge((out - 1) * least, 110) * (1.9 - 1.0 * Math.min(1, out) ** 2);
  };
  paintMean(glow, pitchUm, boxAround([center], Math.max(...axesUm) / 2 + 120), 3, light, (at, mean) => {
    glow.values[at] = (glow.values[at] ?? 0) + mean;
  });
}

/** A line of uneven bleed-out: it swells and thins, but never beyond its stated width. */
function addLine(
  glow: PixelGrid,
  points: readonly PlaceUm[],
  widthUm: number,
  brightness: number,
  pitchUm: number,
  random: SeededRandom,
): void {
  const pieces = points.slice(1).map((to, at) => {
    const from = points[at] ?? to;
    return { from, to, start: random.between(0.55, 1), strength: random.between(0.75, 1.25) };
  });
  const light = (x: number, y: number): number => {
    let most = 0;
    pieces.forEach((piece, at) => {
      const { distance, along } = fromSegment(x, y, piece.from, piece.to);
      const next = pieces[at + 1] ?? piece;
      const half = (widthUm / 2) * (piece.start * (1 - along) + next.start * along);
      const strength = piece.strength * (1 - along) + next.strength * along;
      most = Math.max(most, strength * edge(distance - half, 70) * (1.7 - 0.6 * Math.min(1, distance / half)));
    });
    return brightness * most;
  };
  paintMean(glow, pitchUm, boxAround(points, widthUm + 100), 3, light, (at, mean) => {
    glow.values[at] = (glow.values[at] ?? 0) + mean;
  });
}

function bleedOut(settings: PenetrantSettings, glow: PixelGrid): KnownFlaw[] {
  return settings.indications.map(({ type, shape, brightness }, place) => {
    const seed = seedFrom(settings.seed, 'bleed-out', place);
    const checked = checkShape(shape);
    if (checked.kind === 'polyline')
      addLine(glow, checked.points, checked.width, brightness, settings.pixelPitchUm, randomFrom(seed));
    else if (checked.kind === 'circle')
      addRounded(glow, checked.center, [checked.diameter, checked.diameter], 0, brightness, settings.pixelPitchUm);
    else addRounded(glow, checked.center, checked.axes, checked.angle, brightness, settings.pixelPitchUm);
    return { type, view: settings.view, shape: checked };
  });
}

/** How far each pixel lies in the metal's outline and how steep the surface is there, both 0 to 1. */
function surfaceOf(settings: PenetrantSettings): { inside: PixelGrid; rim: PixelGrid; slope: PixelGrid } {
  const pitchUm = settings.pixelPitchUm;
  const form = formSeenFrom(partForm(settings.partNumber), settings.view);
  // A camera sees no passages, and leaving them out halves the work.
  const { envelope } = thicknessMap(
    { ...form, airfoils: form.airfoils.map((airfoil) => ({ ...airfoil, cavities: [] })) },
    pitchUm,
  );
  const inside = { ...envelope, values: envelope.values.map((depth) => (depth > 0 ? 1 : 0)) };
  const near = blurred(inside, 140 / pitchUm);
  const rim = { ...inside, values: near.values.map((share) => Math.max(0, 1 - Math.abs(2 * share - 1))) };
  const smooth = widelyBlurred({ ...envelope, values: envelope.values.map((depth) => Math.min(depth, 9_000)) }, 420 / pitchUm, 4);
  const slope = frameGrid(pitchUm);
  const { width, values } = smooth;
  for (let at = width; at < values.length - width; at += 1) {
    const across = ((values[at + 1] ?? 0) - (values[at - 1] ?? 0)) / (2 * pitchUm);
    const down = ((values[at + width] ?? 0) - (values[at - width] ?? 0)) / (2 * pitchUm);
    const steep = 0.35 * across + 0.5 * down;
    slope.values[at] = steep / (1 + Math.abs(steep));
  }
  return { inside, rim, slope };
}

/** Penetrant left by the rinse: a haze that gathers in corners and at edges, streaks, and specks of lint that glow blue. */
function addBackground(settings: PenetrantSettings, light: Light, surface: ReturnType<typeof surfaceOf>): void {
  const { width, height } = light.glow;
  const pitchUm = settings.pixelPitchUm;
  const haze = clouds(width, height, 4_200 / pitchUm, randomFrom(seedFrom(settings.seed, 'haze')));
  const streaks = clouds(width, height, 1_300 / pitchUm, randomFrom(seedFrom(settings.seed, 'streaks')));
  const grain = clouds(width, height, 240 / pitchUm, randomFrom(seedFrom(settings.seed, 'skin')));
  const level = settings.background ?? 0.35;
  for (let at = 0; at < light.glow.values.length; at += 1) {
    const inside = surface.inside.values[at] ?? 0;
    const slope = surface.slope.values[at] ?? 0;
    const rim = surface.rim.values[at] ?? 0;
    const skin = 1 + 0.2 * (grain.values[at] ?? 0);
    const patchy = Math.max(0, 0.3 + 0.45 * (haze.values[at] ?? 0) + 0.22 * (streaks.values[at] ?? 0));
    const gathered = Math.abs(slope) * (0.35 + patchy);
    light.glow.values[at] = (light.glow.values[at] ?? 0) + inside * level * (0.045 * patchy + 0.2 * gathered) * skin;
    light.lamp.values[at] = 0.016 + inside * (0.13 + 0.13 * slope) * skin + 0.09 * rim;
  }
  const random = randomFrom(seedFrom(settings.seed, 'lint'));
  for (let speck = 0; speck < 26; speck += 1) {
    const from: PlaceUm = [Math.round(random.between(0, frameUm.width)), Math.round(random.between(0, frameUm.height))];
    const to: PlaceUm = [Math.round(from[0] + random.between(-600, 600)), Math.round(from[1] + random.between(-600, 600))];
    const shine = random.between(0.03, 0.13);
    const fibre = (x: number, y: number): number => shine * edge(fromSegment(x, y, from, to).distance - 20, 80);
    paintMean(light.lamp, pitchUm, boxAround([from, to], 120), 2, fibre, (at, mean) => {
      light.lamp.values[at] = (light.lamp.values[at] ?? 0) + mean;
    });
  }
}

/** Serial on a tag and a steel rule with millimetres, both seen only by the lamp's violet. */
function addTagAndRule(settings: PenetrantSettings, lamp: PixelGrid): void {
  const strokes: (readonly [PlaceUm, PlaceUm])[] = [
    ...letterStrokes(`${settings.partNumber} ${settings.serial}`, [4_000, 1_300], 260),
  ];
  for (let mm = 0; mm <= 20; mm += 1) {
    const height = mm % 10 === 0 ? 1_900 : mm % 5 === 0 ? 1_400 : 900;
    strokes.push([
      [44_000 + mm * 1000, 900],
      [44_000 + mm * 1000, 900 + height],
    ]);
  }
  strokes.push([
    [44_000, 900],
    [64_000, 900],
  ]);
  for (const [from, to] of strokes) {
    const ink = (x: number, y: number): number => edge(fromSegment(x, y, from, to).distance - 55, 80);
    paintMean(lamp, settings.pixelPitchUm, boxAround([from, to], 160), 2, ink, (at, mean) => {
      lamp.values[at] = Math.max(lamp.values[at] ?? 0, 0.26 * mean);
    });
  }
}

// The camera's film-like shoulder as a table: light 0 to 5 in steps of 1/2000, to grey values.
const toneTable = Float32Array.from({ length: 10_001 }, (_, step) => 255 * (1 - Math.exp((-1.5 * step) / 2000)) ** (1 / 1.55));

function tone(light: number): number {
  return toneTable[Math.min(10_000, Math.max(0, Math.round(light * 2000)))] ?? 0;
}

/** The lamp's pool of light, the spread of bright glow in the lens, the camera's shoulder and its sensor noise. */
function developed(light: Light, pitchUm: number, seed: number): Uint8ClampedArray {
  const { width, height } = light.glow;
  const near = blurred(light.glow, 55 / pitchUm);
  const halo = widelyBlurred(light.glow, 600 / pitchUm, 4);
  const veil = widelyBlurred(light.glow, 2_800 / pitchUm, 8);
  const random = randomFrom(seedFrom(seed, 'sensor'));
  const pixels = new Uint8ClampedArray(width * height * 3);
  for (let row = 0; row < height; row += 1) {
    const dy = row / height - 0.33;
    for (let column = 0; column < width; column += 1) {
      const at = row * width + column;
      const dx = column / width - 0.46;
      const pool = 1 / (1 + 3.2 * (dx * dx + dy * dy));
      const glow = pool * ((near.values[at] ?? 0) + 0.32 * (halo.values[at] ?? 0) + 0.16 * (veil.values[at] ?? 0));
      const lamp = pool * (light.lamp.values[at] ?? 0);
      const grain = 1.4 * random.normal();
      // A strong glow fills green first, then red, then a little blue: it looks pale yellow in its core.
      pixels[at * 3] = tone(0.58 * glow + 0.2 * lamp) + grain + 1.6 * random.normal();
      pixels[at * 3 + 1] = tone(1.05 * glow + 0.06 * lamp) + grain + 1.6 * random.normal();
      pixels[at * 3 + 2] = tone(0.09 * glow + 0.04 * glow * glow + 0.62 * lamp) + grain + 1.6 * random.normal();
    }
  }
  return pixels;
}

/**
 * A fluorescent penetrant photograph under UV-A with known bleed-outs. The same settings give the same pixels.
 * @throws RangeError when an indication is not in whole micrometres, or the serial has a character that cannot be drawn.
 */
export function penetrantPhotograph(settings: PenetrantSettings): DemoPhotograph {
  const light: Light = { glow: frameGrid(settings.pixelPitchUm), lamp: frameGrid(settings.pixelPitchUm) };
  addBackground(settings, light, surfaceOf(settings));
  const truth = bleedOut(settings, light.glow);
  addTagAndRule(settings, light.lamp);
  const pixels = developed(light, settings.pixelPitchUm, settings.seed);
  return { pixels, width: light.glow.width, height: light.glow.height, pixelPitchUm: settings.pixelPitchUm, truth };
}
