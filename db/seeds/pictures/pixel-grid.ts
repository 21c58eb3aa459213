import type { SeededRandom } from './seeded-random';

/** One plane of floating-point values, row 0 at the top. */
export interface PixelGrid {
  readonly width: number;
  readonly height: number;
  readonly values: Float32Array;
}

/** A plane filled with one value. */
export function gridOf(width: number, height: number, value = 0): PixelGrid {
  return { width, height, values: new Float32Array(width * height).fill(value) };
}

function kernelOf(sigmaPx: number): number[] {
  const reach = Math.max(1, Math.ceil(3 * sigmaPx));
  const weights = Array.from({ length: 2 * reach + 1 }, (_, place) =>
    Math.exp(-((place - reach) ** 2) / (2 * sigmaPx * sigmaPx)),
  );
  const sum = weights.reduce((total, weight) => total + weight, 0);
  return weights.map((weight) => weight / sum);
}

// One pass along the rows that writes transposed: two passes blur both ways and put the rows back.
function alongRows(source: Float32Array, width: number, height: number, kernel: readonly number[]): Float32Array {
  const target = new Float32Array(source.length);
  const reach = (kernel.length - 1) / 2;
  const line = new Float32Array(width + 2 * reach);
  const weights = Float64Array.from(kernel);
  for (let row = 0; row < height; row += 1) {
    const start = row * width;
    line.fill(source[start] ?? 0, 0, reach);
    line.set(source.subarray(start, start + width), reach);
    line.fill(source[start + width - 1] ?? 0, reach + width);
    for (let column = 0; column < width; column += 1) {
      let sum = 0;
      for (let tap = 0; tap < weights.length; tap += 1) sum += (weights[tap] ?? 0) * (line[column + tap] ?? 0);
      target[column * height + row] = sum;
    }
  }
  return target;
}

/** Gaussian blur of standard deviation `sigmaPx`; the border pixel is repeated outwards. */
export function blurred(grid: PixelGrid, sigmaPx: number): PixelGrid {
  if (sigmaPx <= 0) return { ...grid, values: grid.values.slice() };
  const kernel = kernelOf(sigmaPx);
  const turned = alongRows(grid.values, grid.width, grid.height, kernel);
  return { width: grid.width, height: grid.height, values: alongRows(turned, grid.height, grid.width, kernel) };
}

/** The plane made smaller by whole steps: each value is the mean of a step × step block (edge blocks of what there is). */
export function reduced(grid: PixelGrid, step: number): PixelGrid {
  const width = Math.ceil(grid.width / step);
  const height = Math.ceil(grid.height / step);
  const sums = new Float32Array(width * height);
  const counts = new Float32Array(width * height);
  for (let row = 0; row < grid.height; row += 1) {
    for (let column = 0; column < grid.width; column += 1) {
      const at = Math.floor(row / step) * width + Math.floor(column / step);
      sums[at] = (sums[at] ?? 0) + (grid.values[row * grid.width + column] ?? 0);
      counts[at] = (counts[at] ?? 0) + 1;
    }
  }
  return { width, height, values: sums.map((sum, at) => sum / (counts[at] ?? 1)) };
}

/** The plane made larger to a given size by bilinear interpolation. */
export function enlarged(grid: PixelGrid, width: number, height: number, step: number): PixelGrid {
  const result = gridOf(width, height);
  const row = new Float32Array(grid.width + 1);
  for (let line = 0; line < height; line += 1) {
    const y = Math.min(grid.height - 1, Math.max(0, (line + 0.5) / step - 0.5));
    const upper = Math.floor(y) * grid.width;
    const lower = Math.min(grid.height - 1, Math.floor(y) + 1) * grid.width;
    const down = y - Math.floor(y);
    for (let column = 0; column < grid.width; column += 1) {
      row[column] = (grid.values[upper + column] ?? 0) * (1 - down) + (grid.values[lower + column] ?? 0) * down;
    }
    row[grid.width] = row[grid.width - 1] ?? 0;
    for (let column = 0; column < width; column += 1) {
      const x = Math.min(grid.width - 1, Math.max(0, (column + 0.5) / step - 0.5));
      const left = Math.floor(x);
      result.values[line * width + column] = (row[left] ?? 0) + (x - left) * ((row[left + 1] ?? 0) - (row[left] ?? 0));
    }
  }
  return result;
}

/** Wide blur (sigma of many pixels) made on a plane `step` times smaller: a halo needs no fine detail. */
export function widelyBlurred(grid: PixelGrid, sigmaPx: number, step: number): PixelGrid {
  return enlarged(blurred(reduced(grid, step), sigmaPx / step), grid.width, grid.height, step);
}

/** Cloudy texture of mean about 0 and standard deviation about 0.6, whose clouds are about `cellPx` wide. */
export function clouds(width: number, height: number, cellPx: number, random: SeededRandom): PixelGrid {
  const coarse = gridOf(Math.ceil(width / cellPx) + 2, Math.ceil(height / cellPx) + 2);
  for (let at = 0; at < coarse.values.length; at += 1) coarse.values[at] = random.normal();
  return enlarged(coarse, width, height, cellPx);
}
