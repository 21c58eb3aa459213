/** 16-bit grey pixels as stored, and how they are meant. */
export interface GreyPicture {
  readonly width: number;
  readonly height: number;
  readonly pixels: Uint16Array;
  /** Least and greatest stored value. */
  readonly minimum: number;
  readonly maximum: number;
  /** Window proposed by the file, or null. */
  readonly window: { readonly low: number; readonly high: number } | null;
  /** The file says that low values are shown bright. */
  readonly inverse: boolean;
  /** Meant value = stored · slope + intercept. */
  readonly slope: number;
  readonly intercept: number;
}

type Header = Omit<GreyPicture, 'pixels'>;

/** Reads packed pixels: 'RTP1', header length, header JSON, then gzip of two byte planes of left differences. Throws on anything else. */
export async function unpackPixels(packed: ArrayBuffer): Promise<GreyPicture> {
  const view = new DataView(packed);
  if (packed.byteLength < 8 || view.getUint32(0) !== 0x52545031) throw new Error('These are not packed pixels.');
  const headerLength = view.getUint32(4, true);
  const header = JSON.parse(new TextDecoder().decode(new Uint8Array(packed, 8, headerLength))) as Header;
  const body = new Blob([new Uint8Array(packed, 8 + headerLength)]).stream().pipeThrough(new DecompressionStream('gzip'));
  const planes = new Uint8Array(await new Response(body).arrayBuffer());
  const count = header.width * header.height;
  if (planes.length !== count * 2) throw new Error('The packed pixels are incomplete.');
  return { ...header, pixels: undoDifferences(planes, header.width, count) };
}

function undoDifferences(planes: Uint8Array, width: number, count: number): Uint16Array {
  const pixels = new Uint16Array(count);
  let left = 0;
  for (let index = 0; index < count; index += 1) {
    if (index % width === 0) left = 0;
    left = (left + ((planes[index] ?? 0) | ((planes[count + index] ?? 0) << 8))) & 0xffff;
    pixels[index] = left;
  }
  return pixels;
}

export interface GreyLevel {
  readonly width: number;
  readonly height: number;
  readonly pixels: Uint16Array;
}

/** The picture and its halvings by means of 2 × 2, so that a reduced view shows no pattern that is not there. */
export function meanLevels(picture: GreyLevel): readonly GreyLevel[] {
  const levels: GreyLevel[] = [picture];
  let last: GreyLevel = picture;
  while (Math.max(last.width, last.height) > 256 && Math.min(last.width, last.height) > 1) {
    last = halved(last);
    levels.push(last);
  }
  return levels;
}

function halved({ width, height, pixels }: GreyLevel): GreyLevel {
  const half = { width: Math.ceil(width / 2), height: Math.ceil(height / 2) };
  const means = new Uint16Array(half.width * half.height);
  for (let y = 0; y < half.height; y += 1) {
    const upper = y * 2 * width;
    const lower = Math.min(height - 1, y * 2 + 1) * width;
    for (let x = 0; x < half.width; x += 1) {
      const right = Math.min(width - 1, x * 2 + 1);
      const sum =
        (pixels[upper + x * 2] ?? 0) + (pixels[upper + right] ?? 0) + (pixels[lower + x * 2] ?? 0) + (pixels[lower + right] ?? 0);
      means[y * half.width + x] = (sum + 2) >> 2;
    }
  }
  return { ...half, pixels: means };
}

export interface RegionStatistics {
  readonly count: number;
  readonly mean: number;
  readonly deviation: number;
  readonly low: number;
  readonly high: number;
}

/** Mean, standard deviation and the first and last percentile of a rectangle of stored values; null when it holds no pixel. */
export function regionStatistics(
  picture: GreyLevel,
  from: readonly [number, number],
  to: readonly [number, number],
): RegionStatistics | null {
  const within = (value: number, most: number) => Math.min(most, Math.max(0, Math.round(value)));
  const [x0, x1] = [within(Math.min(from[0], to[0]), picture.width), within(Math.max(from[0], to[0]), picture.width)];
  const [y0, y1] = [within(Math.min(from[1], to[1]), picture.height), within(Math.max(from[1], to[1]), picture.height)];
  const values = new Uint16Array(Math.max(0, x1 - x0) * Math.max(0, y1 - y0));
  if (values.length === 0) return null;
  for (let y = y0; y < y1; y += 1)
    values.set(picture.pixels.subarray(y * picture.width + x0, y * picture.width + x1), (y - y0) * (x1 - x0));
  values.sort();
  const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
  const spread = values.reduce((sum, value) => sum + (value - mean) ** 2, 0);
  const at = (share: number) => values[Math.min(values.length - 1, Math.floor(share * values.length))] ?? 0;
  return {
    count: values.length,
    mean,
    deviation: values.length > 1 ? Math.sqrt(spread / (values.length - 1)) : 0,
    low: at(0.01),
    high: at(0.99),
  };
}
