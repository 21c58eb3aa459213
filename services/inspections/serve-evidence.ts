import { Readable } from 'node:stream';
import type { EvidenceRow } from '@/db/repositories/evidence';
import { notFound, Problem } from '@/services/http/problem';
import { objectStore } from '@/services/storage/object-store';
import { ObjectMissing } from '@/services/storage/store-faults';

/** The bytes under a key. Problem store-unavailable when the store has lost them: the row says that they were admitted. */
async function stored(key: string): Promise<ReadableStream<Uint8Array>> {
  try {
    return Readable.toWeb(await objectStore().getStream(key)) as ReadableStream<Uint8Array>;
  } catch (error) {
    if (error instanceof ObjectMissing)
      throw new Problem(
        'store-unavailable',
        'The stored bytes of this file are missing from the store. Tell the administrator; a backup has them.',
      );
    throw error;
  }
}

// A file that came from outside is shown by no browser as a page of ours.
const caged = { 'x-content-type-options': 'nosniff', 'content-security-policy': "sandbox; default-src 'none'" } as const;
// Content never changes under its digest, but who may see it does: the browser keeps it and asks again.
const kept = 'private, no-cache';

function fileName(name: string): string {
  const plain = name.replace(/[^A-Za-z0-9._ -]/g, '_');
  return `filename="${plain}"; filename*=UTF-8''${encodeURIComponent(name).replace(/['()*]/g, (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`)}`;
}

/** True when the caller already has these bytes (RFC 9110 If-None-Match). */
function has(request: Request, etag: string): boolean {
  return (request.headers.get('if-none-match') ?? '').split(',').some((one) => one.trim().replace(/^W\//, '') === etag);
}

/** The stored bytes themselves: ETag is the digest, Repr-Digest (RFC 9530) lets the receiver check them. */
export async function serveOriginal(request: Request, file: EvidenceRow): Promise<Response> {
  const etag = `"${file.sha256}"`;
  if (has(request, etag)) return new Response(null, { status: 304, headers: { etag, 'cache-control': kept } });
  return new Response(await stored(file.storageKey), {
    headers: {
      ...caged,
      etag,
      'content-type': file.mediaType,
      'content-length': String(file.bytes),
      'content-disposition': `attachment; ${fileName(file.name)}`,
      'repr-digest': `sha-256=:${Buffer.from(file.sha256, 'hex').toString('base64')}:`,
      'cache-control': kept,
    },
  });
}

const derivedForms = {
  preview: { key: 'previewKey', mediaType: 'image/webp' },
  pixels: { key: 'packedKey', mediaType: 'application/octet-stream' },
} as const;

/** Something made from the stored bytes: a preview picture, or 16-bit pixels packed for the viewer. */
export async function serveDerived(request: Request, file: EvidenceRow, form: keyof typeof derivedForms): Promise<Response> {
  const { key, mediaType } = derivedForms[form];
  const storedKey = file[key];
  if (storedKey === null) throw notFound(form === 'preview' ? 'Preview' : 'Packed pixels');
  const etag = `"${file.sha256}-${form}"`;
  if (has(request, etag)) return new Response(null, { status: 304, headers: { etag, 'cache-control': kept } });
  return new Response(await stored(storedKey), {
    headers: { ...caged, etag, 'content-type': mediaType, 'content-disposition': 'inline', 'cache-control': kept },
  });
}
