import { createHash } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { mkdtemp, open, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { evidenceByDigest } from '@/db/repositories/evidence';
import { reading } from '@/db/work';
import type { admitEvidence as contract } from '@/services/contracts/evidence';
import type { QueryOf } from '@/services/contracts/operation';
import { AdmissionRefused } from '@/services/evidence/admission-refused';
import { admitEvidence, mostEvidenceBytes } from '@/services/evidence/admit-evidence';
import { Problem } from '@/services/http/problem';
import { objectStore } from '@/services/storage/object-store';
import { UploadRefused } from '@/services/storage/store-faults';
import type { ReceivedFile } from './admit-evidence';

interface Arrived {
  readonly sha256: string;
  readonly bytes: number;
}

function tooLarge(): Problem {
  return new Problem('too-large', `The file is larger than ${String(mostEvidenceBytes / 1024 / 1024)} MiB. Nothing was stored.`);
}

function incomplete(detail: string): Problem {
  return new Problem('unreadable-file', `The upload did not arrive whole: ${detail} Nothing was stored; send the file again.`);
}

/** Length the sender announced, or null. Problem too-large before a byte is read. */
function announcedBytes(request: Request): number | null {
  const text = request.headers.get('content-length');
  if (text === null || !/^[0-9]{1,15}$/.test(text)) return null;
  if (Number(text) > mostEvidenceBytes) throw tooLarge();
  return Number(text);
}

/** Streams the body to a file of this process, hashing it on the way. Problems: too-large, unreadable-file (broken off, or another length). */
async function receiveBody(request: Request, file: string): Promise<Arrived> {
  const announced = announcedBytes(request);
  const hash = createHash('sha256');
  let bytes = 0;
  const handle = await open(file, 'wx', 0o600);
  try {
    const reader = request.body?.getReader();
    while (reader) {
      const next = await reader.read().catch((error: unknown) => {
        throw incomplete(
          `it stopped after ${String(bytes)} bytes (${error instanceof Error ? error.message : 'no reason given'}).`,
        );
      });
      if (next.done) break;
      const chunk = next.value as Uint8Array;
      bytes += chunk.byteLength;
      if (bytes > mostEvidenceBytes) {
        await reader.cancel().catch(() => undefined);
        throw tooLarge();
      }
      hash.update(chunk);
      await handle.write(chunk);
    }
  } finally {
    await handle.close();
  }
  if (announced !== null && announced !== bytes)
    throw incomplete(`${String(announced)} bytes were announced, ${String(bytes)} arrived.`);
  return { sha256: hash.digest('hex'), bytes };
}

function decimalText(value: number | undefined): string | null {
  if (value === undefined) return null;
  const text = String(value);
  return text.includes('e') ? value.toFixed(9) : text;
}

/** These bytes, when they are admitted already and still in the store. */
async function alreadyThere({ sha256, bytes }: Arrived): Promise<ReceivedFile | null> {
  const row = await evidenceByDigest(reading(), sha256);
  if (!row) return null;
  return (await objectStore().head(row.storageKey))?.bytes === bytes ? row : null;
}

async function store(file: string, arrived: Arrived, query: QueryOf<typeof contract>): Promise<ReceivedFile> {
  const admitted = await admitEvidence(file, query.name, query.kind);
  const { mediaType, width, height, bits, pixelPitchUm, facts, preview, packed } = admitted;
  const objects = objectStore();
  const { key } = await objects.putStream(createReadStream(file), {
    limitBytes: mostEvidenceBytes,
    announcedBytes: arrived.bytes,
    mediaType,
  });
  const previewKey = preview ? `derived/${arrived.sha256}/preview.webp` : null;
  const packedKey = packed ? `derived/${arrived.sha256}/pixels` : null;
  if (preview && previewKey) await objects.putDerived(previewKey, preview, 'image/webp');
  if (packed && packedKey) await objects.putDerived(packedKey, packed, 'application/octet-stream');
  return {
    ...arrived,
    mediaType,
    width: width ?? null,
    height: height ?? null,
    bits: bits ?? null,
    pixelPitchUm: decimalText(pixelPitchUm),
    facts: { ...facts },
    storageKey: key,
    previewKey,
    packedKey,
  };
}

const refusals = { 'too-large': 'too-large', 'not-what-it-says': 'wrong-file-kind', unreadable: 'unreadable-file' } as const;

function asProblem(error: unknown): unknown {
  if (error instanceof AdmissionRefused) return new Problem(refusals[error.code], error.message);
  if (error instanceof UploadRefused) return error.code === 'too-large' ? tooLarge() : incomplete(error.message);
  return error;
}

/**
 * Receives a file of evidence: the body is taken whole and judged before the store keeps anything under its digest, so a
 * refused or broken upload leaves nothing. Problems: too-large, wrong-file-kind, unreadable-file, store-unavailable.
 */
export async function receiveEvidence(query: QueryOf<typeof contract>, request: Request): Promise<ReceivedFile> {
  const folder = await mkdtemp(path.join(tmpdir(), 'evidence-'));
  try {
    const file = path.join(folder, 'body');
    const arrived = await receiveBody(request, file);
    return (await alreadyThere(arrived)) ?? (await store(file, arrived, query));
  } catch (error) {
    throw asProblem(error);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
