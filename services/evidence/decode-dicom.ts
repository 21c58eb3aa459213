import { inflateRawSync } from 'node:zlib';
import dicomParser from 'dicom-parser';
import type { DataSet, Element } from 'dicom-parser';
import { AdmissionRefused } from './admission-refused';
import { dicomFacts, dicomPitch } from './dicom-facts';
import type { GreyPixels } from './pack-pixels';
import { undoRunLength } from './run-length';

const bigEndian = '1.2.840.10008.1.2.2';
const runLength = '1.2.840.10008.1.2.5';
const readable = new Set(['1.2.840.10008.1.2', '1.2.840.10008.1.2.1', '1.2.840.10008.1.2.1.99', bigEndian, runLength]);

/** Names of DICOM PS3.6 for what is refused. */
const syntaxNames: Readonly<Record<string, string>> = {
  '1.2.840.10008.1.2.4.50': 'JPEG Baseline',
  '1.2.840.10008.1.2.4.51': 'JPEG Extended (12 bit)',
  '1.2.840.10008.1.2.4.57': 'JPEG Lossless',
  '1.2.840.10008.1.2.4.70': 'JPEG Lossless, first-order prediction',
  '1.2.840.10008.1.2.4.80': 'JPEG-LS Lossless',
  '1.2.840.10008.1.2.4.81': 'JPEG-LS Near-lossless',
  '1.2.840.10008.1.2.4.90': 'JPEG 2000 Lossless',
  '1.2.840.10008.1.2.4.91': 'JPEG 2000',
};

const mostPixels = 100_000_000;
const mostInflatedBytes = 512 * 1024 * 1024;

export interface DecodedDicom {
  readonly grey: GreyPixels;
  readonly bits: number;
  readonly pixelPitchUm: number | null;
  readonly facts: Record<string, string | number>;
}

/** Reads one monochrome picture of a DICOM or DICONDE file, exactly. Throws AdmissionRefused 'unreadable' naming what is in the way. */
export function decodeDicom(bytes: Buffer): DecodedDicom {
  const data = parse(bytes);
  const syntax = data.string('x00020010') ?? '';
  if (!readable.has(syntax)) {
    throw unreadable(
      `Transfer syntax ${syntaxNames[syntax] ?? 'of an unknown name'} (${syntax || 'not given'}) is not read here; export the file uncompressed.`,
    );
  }
  const format = formatOf(data);
  const raw = storedBytes(data, syntax, format);
  const pitch = dicomPitch(data);
  const facts = { ...dicomFacts(data), transferSyntax: syntax, ...(pitch ? { pixelPitchFrom: pitch.source } : {}) };
  return { grey: greyOf(data, raw, format), bits: format.stored, pixelPitchUm: pitch?.pitchUm ?? null, facts };
}

function unreadable(detail: string): AdmissionRefused {
  return new AdmissionRefused('unreadable', detail);
}

// The parser throws strings and plain objects as well as errors, and reads past the end of a cut file.
function parse(bytes: Buffer): DataSet {
  try {
    return dicomParser.parseDicom(bytes, { inflater: inflateAfter as unknown as (arr: Uint8Array, position: number) => void });
  } catch (fault) {
    if (fault instanceof AdmissionRefused) throw fault;
    const exception = (fault as { exception?: unknown } | null)?.exception ?? fault;
    const detail = exception instanceof Error ? exception.message : String(exception);
    throw unreadable(`The DICOM file is cut off or malformed: ${detail.replace(/^dicomParser\.\w+:\s*/, '')}`);
  }
}

function inflateAfter(bytes: Uint8Array, position: number): Uint8Array {
  const inflated = inflateRawSync(bytes.subarray(position), { maxOutputLength: mostInflatedBytes });
  return Buffer.concat([bytes.subarray(0, position), inflated]);
}

interface Format {
  readonly width: number;
  readonly height: number;
  readonly allocated: 8 | 16;
  readonly stored: number;
  readonly shift: number;
  readonly signed: boolean;
  readonly inverse: boolean;
}

function formatOf(data: DataSet): Format {
  const [width, height] = [data.uint16('x00280011') ?? 0, data.uint16('x00280010') ?? 0];
  if (width === 0 || height === 0 || !data.elements.x7fe00010) throw unreadable('The DICOM file holds no picture.');
  if (width * height > mostPixels)
    throw new AdmissionRefused(
      'too-large',
      `The picture has ${String(width)} × ${String(height)} pixels; at most 100 million are taken.`,
    );
  const frames = Number(data.string('x00280008') || 1);
  if (frames !== 1) throw unreadable(`The file holds ${String(frames)} frames; send each radiograph as its own file.`);
  const photometric = data.string('x00280004') ?? '';
  const samples = data.uint16('x00280002') ?? 1;
  if (samples !== 1 || (photometric !== 'MONOCHROME1' && photometric !== 'MONOCHROME2')) {
    throw unreadable(
      `A radiograph is monochrome; this picture is ${photometric || 'of an unnamed kind'} with ${String(samples)} samples per pixel.`,
    );
  }
  const allocated = data.uint16('x00280100') ?? 0;
  const stored = data.uint16('x00280101') ?? allocated;
  const high = data.uint16('x00280102') ?? stored - 1;
  if ((allocated !== 8 && allocated !== 16) || stored < 1 || stored > allocated || high >= allocated || high < stored - 1) {
    throw unreadable(`Pixels of ${String(stored)} bits in ${String(allocated)} are not read here; 1 to 16 bits in 8 or 16 are.`);
  }
  return {
    width,
    height,
    allocated,
    stored,
    shift: high + 1 - stored,
    signed: data.uint16('x00280103') === 1,
    inverse: photometric === 'MONOCHROME1',
  };
}

function storedBytes(data: DataSet, syntax: string, { width, height, allocated }: Format): Buffer {
  const element = data.elements.x7fe00010 as Element;
  const wanted = (width * height * allocated) / 8;
  if (syntax === runLength) return undoRunLength(firstFrame(data, element), width * height, allocated === 8 ? 1 : 2);
  if (element.encapsulatedPixelData) throw unreadable('The pixels are in fragments, which an uncompressed file never has.');
  const present = Math.min(element.length, data.byteArray.length - element.dataOffset);
  if (present < wanted)
    throw unreadable(`The picture is cut off: ${String(wanted)} bytes of pixels are needed, ${String(present)} are there.`);
  const raw = Buffer.from(data.byteArray.slice(element.dataOffset, element.dataOffset + wanted + (wanted % 2)));
  // Words are swapped in big endian, and 8-bit pixels stored as words with them.
  const swap = syntax === bigEndian && (allocated === 16 || element.vr === 'OW') && raw.length % 2 === 0;
  return swap ? raw.swap16() : raw;
}

function firstFrame(data: DataSet, element: Element): Uint8Array {
  const parts = (element.fragments ?? []).map(({ position, length }) => data.byteArray.slice(position, position + length));
  if (parts.length === 0) throw unreadable('The run-length picture has no fragments.');
  return Buffer.concat(parts);
}

// Signed values are kept with an offset of 32768, which the intercept takes back.
function greyOf(data: DataSet, raw: Buffer, format: Format): GreyPixels {
  const { width, height, allocated, stored, shift, signed, inverse } = format;
  const pixels = new Uint16Array(width * height);
  const mask = 2 ** stored - 1;
  const sign = 2 ** (stored - 1);
  for (let index = 0; index < pixels.length; index += 1) {
    const word = allocated === 8 ? (raw[index] ?? 0) : (raw[index * 2] ?? 0) | ((raw[index * 2 + 1] ?? 0) << 8);
    const value = (word >> shift) & mask;
    pixels[index] = signed ? ((value ^ sign) - sign + 32768) & 0xffff : value;
  }
  const slope = numberOf(data, 'x00281053') ?? 1;
  const offset = signed ? 32768 : 0;
  const meant = numberOf(data, 'x00281052') ?? 0;
  const [centre, breadth] = [numberOf(data, 'x00281050'), numberOf(data, 'x00281051')];
  const storedAt = (value: number) => Math.min(65535, Math.max(0, Math.round((value - meant) / slope + offset)));
  const window =
    centre !== null && breadth !== null && slope > 0 && breadth > 0
      ? { low: storedAt(centre - breadth / 2), high: storedAt(centre + breadth / 2) }
      : null;
  return {
    width,
    height,
    pixels,
    slope,
    intercept: meant - slope * offset,
    inverse,
    window: window && window.high > window.low ? window : null,
  };
}

function numberOf(data: DataSet, tag: string): number | null {
  const text = data.string(tag)?.split('\\')[0];
  const value = text ? Number(text) : Number.NaN;
  return Number.isFinite(value) ? value : null;
}
