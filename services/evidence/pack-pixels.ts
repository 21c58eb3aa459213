import { gzipSync } from 'node:zlib';

/** 16-bit grey pixels as decoded; meant value = stored · slope + intercept. */
export interface GreyPixels {
  readonly width: number;
  readonly height: number;
  readonly pixels: Uint16Array;
  readonly slope: number;
  readonly intercept: number;
  /** The file says that low values are shown bright (MONOCHROME1). */
  readonly inverse: boolean;
  /** Window the file proposes, in stored values. */
  readonly window: { readonly low: number; readonly high: number } | null;
}

/** Packs pixels for the viewer: 'RTP1', header length (little endian), header JSON, then gzip of the low and high byte planes of left differences. */
export function packPixels({ pixels, ...header }: GreyPixels): Buffer {
  let [minimum, maximum] = [65535, 0];
  const planes = Buffer.allocUnsafe(pixels.length * 2);
  let left = 0;
  for (let index = 0; index < pixels.length; index += 1) {
    const value = pixels[index] ?? 0;
    if (index % header.width === 0) left = 0;
    const difference = (value - left) & 0xffff;
    planes[index] = difference & 0xff;
    planes[pixels.length + index] = difference >> 8;
    left = value;
    if (value < minimum) minimum = value;
    if (value > maximum) maximum = value;
  }
  const text = Buffer.from(JSON.stringify({ ...header, minimum, maximum }));
  const front = Buffer.alloc(8);
  front.write('RTP1', 'latin1');
  front.writeUInt32LE(text.length, 4);
  return Buffer.concat([front, text, gzipSync(planes, { level: 1 })]);
}
