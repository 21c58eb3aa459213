/** Distinguished Encoding Rules (ITU-T X.690) as far as a detached signature needs: written exactly, read strictly. */

/** Bytes that are not strict DER where DER is demanded. */
export class DerError extends Error {
  constructor(fault: string) {
    super(fault);
    this.name = 'DerError';
  }
}

export const tags = {
  integer: 0x02,
  octetString: 0x04,
  null: 0x05,
  objectIdentifier: 0x06,
  sequence: 0x30,
  set: 0x31,
} as const;

/** One element: tag, length, content. */
export function der(tag: number, ...parts: Uint8Array[]): Buffer {
  const content = Buffer.concat(parts);
  const size = content.length;
  if (size < 0x80) return Buffer.concat([Buffer.from([tag, size]), content]);
  const digits: number[] = [];
  for (let rest = size; rest > 0; rest = Math.floor(rest / 256)) digits.unshift(rest % 256);
  return Buffer.concat([Buffer.from([tag, 0x80 | digits.length, ...digits]), content]);
}

export const sequence = (...parts: Uint8Array[]) => der(tags.sequence, ...parts);
export const octets = (bytes: Uint8Array) => der(tags.octetString, bytes);

/** SET OF: members in ascending order of their encoding (X.690, 11.6). */
export const setOf = (...parts: Uint8Array[]) => der(tags.set, ...[...parts].sort(Buffer.compare));

export function smallInteger(value: number): Buffer {
  return der(tags.integer, Buffer.from([value]));
}

export function objectIdentifier(dotted: string): Buffer {
  const [first = 0, second = 0, ...rest] = dotted.split('.').map(Number);
  const bytes = [first * 40 + second];
  for (const arc of rest) {
    const digits = [arc % 128];
    for (let left = Math.floor(arc / 128); left > 0; left = Math.floor(left / 128)) digits.unshift(0x80 | (left % 128));
    bytes.push(...digits);
  }
  return der(tags.objectIdentifier, Buffer.from(bytes));
}

export interface DerElement {
  tag: number;
  /** The whole element. */
  bytes: Buffer;
  content: Buffer;
}

/** Reads the element at an offset. Throws DerError for long tags, indefinite or over-long lengths, and a cut element. */
export function readElement(bytes: Buffer, offset = 0): DerElement {
  const tag = bytes[offset];
  const first = bytes[offset + 1];
  if (tag === undefined || first === undefined) throw new DerError('is cut');
  if ((tag & 0x1f) === 0x1f) throw new DerError('has a long tag');
  let start = offset + 2;
  let size = first;
  if (first >= 0x80) {
    const count = first & 0x7f;
    if (count === 0 || count > 4 || start + count > bytes.length) throw new DerError('has an indefinite or wrong length');
    size = bytes.readUIntBE(start, count);
    start += count;
    if (size < 0x80 || (count > 1 && size < 256 ** (count - 1))) throw new DerError('has a length that is not the shortest');
  }
  if (start + size > bytes.length) throw new DerError('is cut');
  return { tag, bytes: bytes.subarray(offset, start + size), content: bytes.subarray(start, start + size) };
}

/** The members of a constructed element, at most `most`. */
export function readMembers(element: DerElement, most = 64): DerElement[] {
  const members: DerElement[] = [];
  for (let offset = 0; offset < element.content.length;) {
    if (members.length === most) throw new DerError('has too many members');
    const member = readElement(element.content, offset);
    members.push(member);
    offset += member.bytes.length;
  }
  return members;
}
