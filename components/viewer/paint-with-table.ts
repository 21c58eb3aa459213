import { levelFor } from './grey-view';
import type { GreyView } from './grey-view';
import type { GreyLevel } from './packed-pixels';

/** Grey value on the screen for every stored value. */
export function lookUpTable(low: number, high: number, invert: boolean): Uint8Array {
  const table = new Uint8Array(65536);
  const span = Math.max(1, high - low);
  for (let value = 0; value < 65536; value += 1) {
    const share = Math.min(1, Math.max(0, (value - low) / span));
    table[value] = Math.round(255 * (invert ? 1 - share : share));
  }
  return table;
}

/** Paints with a look-up table, nearest pixel; outside the picture is black. */
export function paintWithTable(context: CanvasRenderingContext2D, levels: readonly GreyLevel[], view: GreyView): void {
  const { width, height } = context.canvas;
  if (width === 0 || height === 0) return;
  const scale = view.viewport.zoom * view.devicePixelRatio;
  const number = levelFor(levels, scale);
  const level = levels[number];
  if (!level) return;
  const table = lookUpTable(view.low, view.high, view.invert);
  const reduction = 2 ** number;
  const image = context.createImageData(width, height);
  const screen = new Uint32Array(image.data.buffer);
  const columns = Int32Array.from({ length: width }, (_, x) => Math.floor((view.viewport.left + (x + 0.5) / scale) / reduction));
  for (let y = 0; y < height; y += 1) {
    const row = Math.floor((view.viewport.top + (y + 0.5) / scale) / reduction);
    const inside = row >= 0 && row < level.height;
    for (let x = 0; x < width; x += 1) {
      const column = columns[x] ?? -1;
      const grey =
        inside && column >= 0 && column < level.width ? (table[level.pixels[row * level.width + column] ?? 0] ?? 0) : 0;
      screen[y * width + x] = 0xff000000 | (grey << 16) | (grey << 8) | grey;
    }
  }
  context.putImageData(image, 0, 0);
}
