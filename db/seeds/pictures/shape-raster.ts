import { frameUm, type PlaceUm } from './part-forms';
import { gridOf, type PixelGrid } from './pixel-grid';

const rowsPerPixel = 4;

/** An empty plane for the whole frame at a pixel pitch. */
export function frameGrid(pixelPitchUm: number): PixelGrid {
  return gridOf(Math.round(frameUm.width / pixelPitchUm), Math.round(frameUm.height / pixelPitchUm));
}

/** How much of each pixel a filled polygon covers, 0 to 1 (even-odd; four scan lines a pixel, exact along them). */
export function polygonCoverage(polygon: readonly PlaceUm[], pixelPitchUm: number): PixelGrid {
  const grid = frameGrid(pixelPitchUm);
  for (let line = 0; line < grid.height * rowsPerPixel; line += 1) {
    const yUm = frameUm.height - ((line + 0.5) / rowsPerPixel) * pixelPitchUm;
    const crossings: number[] = [];
    polygon.forEach(([ax, ay], at) => {
      const [bx, by] = polygon[(at + 1) % polygon.length] ?? [ax, ay];
      if (ay > yUm !== by > yUm) crossings.push((ax + ((yUm - ay) / (by - ay)) * (bx - ax)) / pixelPitchUm);
    });
    crossings.sort((one, other) => one - other);
    const start = Math.floor(line / rowsPerPixel) * grid.width;
    for (let pair = 0; pair + 1 < crossings.length; pair += 2) {
      const from = crossings[pair] ?? 0;
      const to = crossings[pair + 1] ?? 0;
      for (let column = Math.max(0, Math.floor(from)); column < Math.min(grid.width, to); column += 1) {
        const part = Math.min(to, column + 1) - Math.max(from, column);
        grid.values[start + column] = (grid.values[start + column] ?? 0) + part / rowsPerPixel;
      }
    }
  }
  return grid;
}

/** Distance of a point from a segment, and how far along it (0 to 1) the nearest point lies. */
export function fromSegment(x: number, y: number, a: PlaceUm, b: PlaceUm): { distance: number; along: number } {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const squared = dx * dx + dy * dy;
  const along = squared === 0 ? 0 : Math.min(1, Math.max(0, ((x - a[0]) * dx + (y - a[1]) * dy) / squared));
  return { distance: Math.hypot(x - a[0] - along * dx, y - a[1] - along * dy), along };
}

/** Box around places in whole micrometres, widened on every side. */
export interface BoxUm {
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
  readonly top: number;
}

export function boxAround(places: readonly PlaceUm[], marginUm: number): BoxUm {
  const xs = places.map(([x]) => x);
  const ys = places.map(([, y]) => y);
  return {
    left: Math.min(...xs) - marginUm,
    right: Math.max(...xs) + marginUm,
    bottom: Math.min(...ys) - marginUm,
    top: Math.max(...ys) + marginUm,
  };
}

/**
 * Visits the pixels of a box with the mean of `depth` over each (fine × fine samples): a pore a few pixels wide
 * must not gain or lose volume by where it falls on the pixel grid.
 */
export function paintMean(
  grid: PixelGrid,
  pixelPitchUm: number,
  box: BoxUm,
  fine: number,
  depth: (xUm: number, yUm: number) => number,
  paint: (at: number, mean: number) => void,
): void {
  const firstColumn = Math.max(0, Math.floor(box.left / pixelPitchUm));
  const lastColumn = Math.min(grid.width - 1, Math.floor(box.right / pixelPitchUm));
  const firstRow = Math.max(0, Math.floor((frameUm.height - box.top) / pixelPitchUm));
  const lastRow = Math.min(grid.height - 1, Math.floor((frameUm.height - box.bottom) / pixelPitchUm));
  for (let row = firstRow; row <= lastRow; row += 1) {
    for (let column = firstColumn; column <= lastColumn; column += 1) {
      let sum = 0;
      for (let sample = 0; sample < fine * fine; sample += 1) {
        const xUm = (column + ((sample % fine) + 0.5) / fine) * pixelPitchUm;
        const yUm = frameUm.height - (row + (Math.floor(sample / fine) + 0.5) / fine) * pixelPitchUm;
        sum += depth(xUm, yUm);
      }
      if (sum !== 0) paint(row * grid.width + column, sum / (fine * fine));
    }
  }
}
