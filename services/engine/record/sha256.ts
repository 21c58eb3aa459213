const ROUND = 64;

/** The first 32 bits of the fractional parts of a root of the first primes, in whole-number arithmetic (FIPS 180-4, 4.2.2, 5.3.3). */
function primes(count: number): bigint[] {
  const found: bigint[] = [];
  for (let n = 2n; found.length < count; n += 1n) if (found.every((p) => n % p !== 0n)) found.push(n);
  return found;
}

function fractionOfRoot(prime: bigint, power: bigint): number {
  const target = prime << (32n * power);
  let root = 0n;
  for (let bit = 36n; bit >= 0n; bit -= 1n) {
    const next = root | (1n << bit);
    if (next ** power <= target) root = next;
  }
  return Number(root & 0xffffffffn) | 0;
}

const K = Int32Array.from(primes(ROUND), (p) => fractionOfRoot(p, 3n));
const START = Int32Array.from(primes(8), (p) => fractionOfRoot(p, 2n));

function turn(x: number, by: number): number {
  return (x >>> by) | (x << (32 - by));
}

function compress(state: Int32Array, w: Int32Array): void {
  for (let t = 16; t < ROUND; t += 1) {
    const a = w[t - 15] ?? 0;
    const b = w[t - 2] ?? 0;
    w[t] =
      ((w[t - 16] ?? 0) + (turn(a, 7) ^ turn(a, 18) ^ (a >>> 3)) + (w[t - 7] ?? 0) + (turn(b, 17) ^ turn(b, 19) ^ (b >>> 10))) |
      0;
  }
  let [a = 0, b = 0, c = 0, d = 0, e = 0, f = 0, g = 0, h = 0] = state;
  for (let t = 0; t < ROUND; t += 1) {
    const one = (h + (turn(e, 6) ^ turn(e, 11) ^ turn(e, 25)) + ((e & f) ^ (~e & g)) + (K[t] ?? 0) + (w[t] ?? 0)) | 0;
    const two = ((turn(a, 2) ^ turn(a, 13) ^ turn(a, 22)) + ((a & b) ^ (a & c) ^ (b & c))) | 0;
    [h, g, f, e, d, c, b, a] = [g, f, e, (d + one) | 0, c, b, a, (one + two) | 0];
  }
  [a, b, c, d, e, f, g, h].forEach((word, index) => {
    state[index] = ((state[index] ?? 0) + word) | 0;
  });
}

/** UTF-8 bytes of a text without lone surrogates. */
export function utf8Of(text: string): Uint8Array {
  const bytes = new Uint8Array(text.length * 3);
  let at = 0;
  for (let i = 0; i < text.length; i += 1) {
    const code = text.codePointAt(i) ?? 0;
    if (code > 0xffff) i += 1;
    if (code < 0x80) bytes[at++] = code;
    else {
      if (code < 0x800) bytes[at++] = 0xc0 | (code >> 6);
      else {
        if (code < 0x10000) bytes[at++] = 0xe0 | (code >> 12);
        else {
          bytes[at++] = 0xf0 | (code >> 18);
          bytes[at++] = 0x80 | ((code >> 12) & 63);
        }
        bytes[at++] = 0x80 | ((code >> 6) & 63);
      }
      bytes[at++] = 0x80 | (code & 63);
    }
  }
  return bytes.subarray(0, at);
}

/** SHA-256 of bytes as 64 lower-case hexadecimal digits (FIPS 180-4). */
export function sha256Hex(bytes: Uint8Array): string {
  const padded = new Uint8Array((((bytes.length + 8) >> 6) + 1) << 6);
  padded.set(bytes);
  padded[bytes.length] = 0x80;
  const view = new DataView(padded.buffer);
  view.setUint32(padded.length - 8, Math.floor(bytes.length / 0x20000000));
  view.setUint32(padded.length - 4, (bytes.length << 3) >>> 0);
  const state = START.slice();
  const w = new Int32Array(ROUND);
  for (let block = 0; block < padded.length; block += 64) {
    for (let t = 0; t < 16; t += 1) w[t] = view.getInt32(block + 4 * t);
    compress(state, w);
  }
  return Array.from(state, (word) => (word >>> 0).toString(16).padStart(8, '0')).join('');
}
