import sharp from 'sharp';
import type { Metadata } from 'sharp';
import { AdmissionRefused } from './admission-refused';
import type { GreyPixels } from './pack-pixels';

// Every loader is shut, then those of the kinds we take are opened: no SVG, no PDF, no ImageMagick.
sharp.block({ operation: ['VipsForeignLoad'] });
sharp.unblock({ operation: ['VipsForeignLoadPng', 'VipsForeignLoadJpeg', 'VipsForeignLoadTiff'] });

const limits = { limitInputPixels: 100_000_000, failOn: 'warning' } as const;
const previewSide = 1600;

export interface DecodedPicture {
  readonly width: number;
  readonly height: number;
  readonly bits: number;
  /** Present for 16-bit grey pictures and for any picture admitted as a radiograph. */
  readonly grey: GreyPixels | null;
  readonly preview: Buffer;
  readonly facts: Record<string, string | number>;
}

/** Reads a PNG, JPEG or TIFF. Sizes are those after the camera's orientation is applied. Throws AdmissionRefused 'unreadable' or 'too-large'. */
export async function decodePicture(bytes: Buffer, asRadiograph: boolean): Promise<DecodedPicture> {
  try {
    const known = await sharp(bytes, limits).metadata();
    refuseUnfit(known, asRadiograph);
    const turned = (known.orientation ?? 1) >= 5;
    const [width, height] = turned ? [known.height, known.width] : [known.width, known.height];
    const bits = known.depth === 'ushort' ? 16 : 8;
    const grey = asRadiograph || (bits === 16 && known.channels === 1) ? await exactGrey(bytes, bits) : null;
    const preview = grey ? await greyPreview(grey) : await colourPreview(bytes);
    const facts: Record<string, string | number> = { format: known.format, channels: known.channels };
    if (known.orientation !== undefined) facts.orientation = known.orientation;
    if (known.density !== undefined) facts.densityPerInch = known.density;
    return { width, height, bits, grey, preview, facts };
  } catch (error) {
    if (error instanceof AdmissionRefused) throw error;
    const detail = error instanceof Error ? error.message : String(error);
    if (/pixel limit/i.test(detail)) throw new AdmissionRefused('too-large', 'The picture has more than 100 million pixels.');
    throw new AdmissionRefused('unreadable', `The picture is cut off or damaged: ${detail.split('\n')[0] ?? ''}`);
  }
}

function refuseUnfit(known: Metadata, asRadiograph: boolean): void {
  if (known.depth !== 'uchar' && known.depth !== 'ushort') {
    throw new AdmissionRefused('unreadable', `Pixels of kind ${known.depth} are not read here; send 8 or 16 bits without sign.`);
  }
  if ((known.pages ?? 1) > 1)
    throw new AdmissionRefused('unreadable', `The file holds ${String(known.pages)} pictures; send each as its own file.`);
  if (asRadiograph && known.channels !== 1) {
    throw new AdmissionRefused('unreadable', `A radiograph is monochrome; this picture has ${String(known.channels)} channels.`);
  }
}

// Without the colour space and depth named, the library answers 8 bits and three channels.
async function exactGrey(bytes: Buffer, bits: number): Promise<GreyPixels> {
  const image = sharp(bytes, limits).autoOrient();
  const sixteen = bits === 16;
  const { data, info } = sixteen
    ? await image.toColourspace('grey16').raw({ depth: 'ushort' }).toBuffer({ resolveWithObject: true })
    : await image.toColourspace('b-w').raw({ depth: 'uchar' }).toBuffer({ resolveWithObject: true });
  if (info.channels !== 1)
    throw new AdmissionRefused('unreadable', 'A radiograph is monochrome; this picture has several channels.');
  const pixels = sixteen
    ? new Uint16Array(data.buffer.slice(data.byteOffset, data.byteOffset + data.length))
    : Uint16Array.from(data);
  return { width: info.width, height: info.height, pixels, slope: 1, intercept: 0, inverse: false, window: null };
}

async function colourPreview(bytes: Buffer): Promise<Buffer> {
  const image = sharp(bytes, limits).autoOrient();
  return image
    .resize({ width: previewSide, height: previewSide, fit: 'inside', withoutEnlargement: true })
    .webp({ quality: 82 })
    .toBuffer();
}

/** An 8-bit look at a 16-bit picture through its window, or its whole range. */
export async function greyPreview({ pixels, width, height, window, inverse }: GreyPixels): Promise<Buffer> {
  const low = window?.low ?? pixels.reduce((least, value) => Math.min(least, value), 65535);
  const high = window?.high ?? pixels.reduce((most, value) => Math.max(most, value), 0);
  const span = Math.max(1, high - low);
  const shown = Buffer.allocUnsafe(pixels.length);
  for (let index = 0; index < pixels.length; index += 1) {
    const share = Math.min(1, Math.max(0, ((pixels[index] ?? 0) - low) / span));
    shown[index] = Math.round(255 * (inverse ? 1 - share : share));
  }
  const image = sharp(shown, { raw: { width, height, channels: 1 }, limitInputPixels: limits.limitInputPixels });
  return image
    .resize({ width: previewSide, height: previewSide, fit: 'inside', withoutEnlargement: true })
    .webp({ quality: 82 })
    .toBuffer();
}
