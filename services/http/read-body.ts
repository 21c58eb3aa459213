import { Problem } from './problem';

/** Largest JSON body a call takes, in bytes (2 MiB). */
export const jsonLimitBytes = 2 * 1024 * 1024;

/** Reads a JSON body of at most 2 MiB. Problems: too-large, malformed-body. An empty body is undefined. */
export async function readJson(request: Request): Promise<unknown> {
  const declared = Number(request.headers.get('content-length') ?? '0');
  if (declared > jsonLimitBytes) throw tooLarge();
  const chunks: Uint8Array[] = [];
  let size = 0;
  if (request.body) {
    const reader = request.body.getReader();
    for (let next = await reader.read(); !next.done; next = await reader.read()) {
      const chunk = next.value as Uint8Array;
      size += chunk.byteLength;
      if (size > jsonLimitBytes) {
        await reader.cancel();
        throw tooLarge();
      }
      chunks.push(chunk);
    }
  }
  if (size === 0) return undefined;
  try {
    return JSON.parse(new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(chunks)));
  } catch {
    throw new Problem('malformed-body', 'The body is not readable JSON in UTF-8.');
  }
}

function tooLarge(): Problem {
  return new Problem('too-large', `The body is larger than ${String(jsonLimitBytes / 1024 / 1024)} MiB.`);
}
