import { readFile, stat } from 'node:fs/promises';
import type { Readable } from 'node:stream';
import { AdmissionRefused } from './admission-refused';
import { decodeDicom } from './decode-dicom';
import { decodePicture, greyPreview } from './decode-picture';
import { packPixels } from './pack-pixels';
import { mediaTypes, sniff } from './sniff';

/** Most bytes of one file of evidence. */
export const mostEvidenceBytes = 256 * 1024 * 1024;

/** What a file is found to be. `packed` is for the viewer, `preview` is WebP; both are derived and can be made again. */
export interface Admitted {
  readonly mediaType: string;
  readonly width?: number;
  readonly height?: number;
  readonly bits?: number;
  readonly pixelPitchUm?: number;
  readonly facts: Record<string, string | number>;
  readonly packed?: Buffer;
  readonly preview?: Buffer;
}

/**
 * Reads a file (a path or a stream) as evidence of a kind: radiograph, photograph, reading-file, document. Nothing is stored.
 * Throws AdmissionRefused 'too-large', 'not-what-it-says' or 'unreadable' with a sentence naming the cause.
 */
export async function admitEvidence(source: Readable | string, declaredName: string, kind: string): Promise<Admitted> {
  const bytes = typeof source === 'string' ? await fileBytes(source) : await streamBytes(source);
  const found = sniff(bytes, declaredName, kind);
  const mediaType = mediaTypes[found];
  if (found === 'dicom') {
    const { grey, bits, pixelPitchUm, facts } = decodeDicom(bytes);
    const sizes = { width: grey.width, height: grey.height, bits, ...(pixelPitchUm === null ? {} : { pixelPitchUm }) };
    return { mediaType, ...sizes, facts, packed: packPixels(grey), preview: await greyPreview(grey) };
  }
  if (found === 'pdf') {
    if (!bytes.subarray(-2048).includes('%%EOF'))
      throw new AdmissionRefused('unreadable', 'The PDF is cut off: its end mark is missing.');
    return { mediaType, facts: {} };
  }
  if (found === 'text')
    return {
      mediaType,
      facts: {
        lines: bytes
          .toString('utf8')
          .trimEnd()
          .split(/\r\n|\r|\n/).length,
      },
    };
  const { grey, width, height, bits, facts, preview } = await decodePicture(bytes, kind === 'radiograph');
  return { mediaType, width, height, bits, facts, preview, ...(grey ? { packed: packPixels(grey) } : {}) };
}

function refuseSize(bytes: number): void {
  if (bytes > mostEvidenceBytes)
    throw new AdmissionRefused('too-large', `The file is larger than ${String(mostEvidenceBytes / 1024 / 1024)} MiB.`);
}

async function fileBytes(path: string): Promise<Buffer> {
  refuseSize((await stat(path)).size);
  return readFile(path);
}

async function streamBytes(stream: Readable): Promise<Buffer> {
  const chunks: Buffer[] = [];
  let length = 0;
  for await (const chunk of stream) {
    length += (chunk as Buffer).length;
    refuseSize(length);
    chunks.push(chunk as Buffer);
  }
  return Buffer.concat(chunks);
}
