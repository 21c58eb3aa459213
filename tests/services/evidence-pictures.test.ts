import { deflateSync } from 'node:zlib';
import { Readable } from 'node:stream';
import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import { unpackPixels } from '@/components/viewer/packed-pixels';
import { admitEvidence } from '@/services/evidence/admit-evidence';
import type { AdmissionRefused } from '@/services/evidence/admission-refused';

const [width, height] = [257, 129];
const ramp = Uint16Array.from({ length: width * height }, (_, index) => (index * 40503) & 0xffff);

// Written here byte by byte (TIFF 6.0, PNG 1.2, from memory), so that writer and reader are not the same library.
function tiff(): Buffer {
  const entries = [
    [256, 4, width],
    [257, 4, height],
    [258, 3, 16],
    [259, 3, 1],
    [262, 3, 1],
    [273, 4, 8],
    [277, 3, 1],
    [278, 4, height],
    [279, 4, ramp.length * 2],
  ] as const;
  const head = Buffer.from([0x49, 0x49, 42, 0, 0, 0, 0, 0]);
  head.writeUInt32LE(8 + ramp.length * 2, 4);
  const folder = Buffer.alloc(2 + entries.length * 12 + 4);
  folder.writeUInt16LE(entries.length, 0);
  entries.forEach(([tag, type, value], index) => {
    folder.writeUInt16LE(tag, 2 + index * 12);
    folder.writeUInt16LE(type, 4 + index * 12);
    folder.writeUInt32LE(1, 6 + index * 12);
    folder.writeUInt32LE(value, 10 + index * 12);
  });
  return Buffer.concat([head, Buffer.from(ramp.buffer), folder]);
}

function crc(bytes: Buffer): number {
  let sum = 0xffffffff;
  for (const byte of bytes) {
    sum ^= byte;
    for (let bit = 0; bit < 8; bit += 1) sum = sum & 1 ? (sum >>> 1) ^ 0xedb88320 : sum >>> 1;
  }
  return (sum ^ 0xffffffff) >>> 0;
}

function png(): Buffer {
  const chunk = (type: string, data: Buffer) => {
    const body = Buffer.concat([Buffer.from(type), data]);
    const [length, check] = [Buffer.alloc(4), Buffer.alloc(4)];
    length.writeUInt32BE(data.length);
    check.writeUInt32BE(crc(body));
    return Buffer.concat([length, body, check]);
  };
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header[8] = 16;
  const rows = Array.from({ length: height }, (_, y) => {
    const row = Buffer.alloc(1 + width * 2);
    for (let x = 0; x < width; x += 1) row.writeUInt16BE(ramp[y * width + x] ?? 0, 1 + x * 2);
    return row;
  });
  const start = Buffer.from([0x89, 0x50, 0x4e, 0x47, 13, 10, 26, 10]);
  return Buffer.concat([
    start,
    chunk('IHDR', header),
    chunk('IDAT', deflateSync(Buffer.concat(rows))),
    chunk('IEND', Buffer.alloc(0)),
  ]);
}

const admit = (bytes: Buffer, name: string, kind: string) => admitEvidence(Readable.from([bytes]), name, kind);
const codeOf = (bytes: Buffer, name: string, kind: string) =>
  admit(bytes, name, kind).then(
    () => 'admitted',
    (error: AdmissionRefused) => `${error.code}: ${error.message}`,
  );

describe('pictures at admission', () => {
  it.each([
    ['tiff', tiff],
    ['png', png],
  ] as const)('16-bit %s reaches the viewer exactly', async (ending, make) => {
    const admitted = await admit(make(), `a.${ending}`, 'radiograph');
    expect(admitted).toMatchObject({ width, height, bits: 16 });
    const packed = admitted.packed as Buffer;
    const back = await unpackPixels(packed.buffer.slice(packed.byteOffset, packed.byteOffset + packed.length) as ArrayBuffer);
    expect(Buffer.from(back.pixels.buffer).equals(Buffer.from(ramp.buffer))).toBe(true);
    expect([back.minimum, back.maximum]).toEqual([Math.min(...ramp), Math.max(...ramp)]);
  });

  it('a cut PNG, TIFF and JPEG are unreadable', async () => {
    const jpeg = await sharp({ create: { width: 400, height: 300, channels: 3, background: '#345' } })
      .jpeg()
      .toBuffer();
    for (const [name, bytes] of [
      ['a.png', png()],
      ['a.tif', tiff()],
      ['a.jpg', jpeg],
    ] as const) {
      expect(await codeOf(bytes.subarray(0, Math.floor(bytes.length / 2)), name, 'document')).toMatch(/^unreadable/);
    }
  });

  it('names what is not what it says', async () => {
    expect(await codeOf(png(), 'a.jpg', 'photograph')).toMatch(/^not-what-it-says: .*\.jpg.*PNG/);
    expect(await codeOf(png(), 'a.csv', 'reading-file')).toMatch(/^not-what-it-says/);
    expect(await codeOf(Buffer.from('<svg xmlns="http://www.w3.org/2000/svg"/>'), 'a.png', 'photograph')).toMatch(/SVG/);
    expect(await codeOf(Buffer.from('<!DOCTYPE html><p>'), 'a.csv', 'reading-file')).toMatch(/HTML/);
    expect(await codeOf(Buffer.alloc(0), 'a.csv', 'reading-file')).toMatch(/^unreadable: .*empty/);
  });

  it('applies the orientation of the camera', async () => {
    const turned = await sharp({ create: { width: 40, height: 20, channels: 3, background: '#345' } })
      .jpeg()
      .withMetadata({ orientation: 6 })
      .toBuffer();
    expect(await admit(turned, 'a.jpg', 'photograph')).toMatchObject({ width: 20, height: 40 });
  });
});
