/** Where a seal stands in a file and what it holds; found by fixed text only, so that time and memory are linear in the file. */
export interface FoundSeal {
  /** Offset of '<' and one past '>' of the signature. */
  holeAt: number;
  holeEnd: number;
  /** The signature's bytes without the zeros behind it. */
  cms: Buffer;
  /** True when the range names every byte of the file but the signature's hex string. */
  coversWholeFile: boolean;
}

/** The widest `/ByteRange` we write. */
const mostRangeText = 64;
const mostHoleBytes = 200_000;

/** The single seal of a file, or the reason why there is none. */
export function findSeal(bytes: Buffer): FoundSeal | 'no-seal' | 'several-seals' | 'malformed-seal' {
  const key = '/ByteRange ';
  const keyAt = bytes.indexOf(key, 0, 'latin1');
  if (keyAt < 0) return bytes.indexOf('/ByteRange', 0, 'latin1') < 0 ? 'no-seal' : 'malformed-seal';
  if (bytes.indexOf('/ByteRange', keyAt + 1, 'latin1') >= 0) return 'several-seals';
  const text = bytes.toString('latin1', keyAt + key.length, keyAt + key.length + mostRangeText);
  const numbers = /^\[ 0 (\d{1,10}) (\d{1,10}) (\d{1,10}) *\]/.exec(text);
  if (numbers === null) return 'malformed-seal';
  const [holeAt, holeEnd, rest] = [Number(numbers[1]), Number(numbers[2]), Number(numbers[3])];
  if (holeAt >= holeEnd || holeEnd > bytes.length || holeEnd - holeAt > mostHoleBytes) return 'malformed-seal';
  const hex = bytes.toString('latin1', holeAt, holeEnd);
  const digits = /^<([0-9a-f]+)>$/.exec(hex)?.[1];
  if (digits === undefined || digits.length % 2 !== 0) return 'malformed-seal';
  const filled = Buffer.from(digits, 'hex');
  const size = outerSize(filled);
  if (size === undefined || filled.subarray(size).some((byte) => byte !== 0)) return 'malformed-seal';
  return { holeAt, holeEnd, cms: filled.subarray(0, size), coversWholeFile: holeEnd + rest === bytes.length };
}

/** Size in bytes of the DER element that the room begins with. */
function outerSize(room: Buffer): number | undefined {
  if (room[0] !== 0x30 || room[1] !== 0x82 || room.length < 4) return undefined;
  const size = 4 + room.readUInt16BE(2);
  return size <= room.length ? size : undefined;
}
