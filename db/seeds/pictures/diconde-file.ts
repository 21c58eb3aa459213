import { createHash } from 'node:crypto';
import type { GreyPicture } from './picture-files';

/** Facts of an exposure that travel with its picture. Dates are `2026-03-09`, times `14:05:06`; nothing is read from a clock. */
export interface DicondeFacts {
  readonly componentName: string;
  readonly componentId: string;
  readonly serial: string;
  readonly company: string;
  readonly operator: string;
  readonly date: string;
  readonly time: string;
  readonly tubeVoltageKv: string;
  readonly tubeCurrentMa: string;
  readonly exposureMs: number;
  readonly sourceToDetectorMm: string;
  readonly viewName: string;
}

type Element = readonly [group: number, element: number, representation: string, value: Buffer];

// Digital X-Ray Image Storage - For Processing, Explicit VR Little Endian (DICOM PS3.4 and PS3.5).
const storageClass = '1.2.840.10008.5.1.4.1.1.1.1.1';
const transferSyntax = '1.2.840.10008.1.2.1';
const longForms = new Set(['OB', 'OW', 'SQ', 'UN', 'UT']);

function text(group: number, element: number, representation: string, value: string): Element {
  const bytes = Buffer.from(value, 'utf8');
  // Even length: identifiers end in a zero byte, other text in a space (PS3.5, 6.2).
  const pad = bytes.length % 2 === 0 ? '' : representation === 'UI' ? '\0' : ' ';
  return [group, element, representation, Buffer.concat([bytes, Buffer.from(pad)])];
}

function short(group: number, element: number, value: number): Element {
  const bytes = Buffer.alloc(2);
  bytes.writeUInt16LE(value);
  return [group, element, 'US', bytes];
}

function encoded([group, element, representation, value]: Element): Buffer {
  const long = longForms.has(representation);
  const head = Buffer.alloc(long ? 12 : 8);
  head.writeUInt16LE(group, 0);
  head.writeUInt16LE(element, 2);
  head.write(representation, 4, 'latin1');
  if (long) head.writeUInt32LE(value.length, 8);
  else head.writeUInt16LE(value.length, 6);
  return Buffer.concat([head, value]);
}

/** Identifier under 2.25 (ITU-T X.667) from a digest of what it names: the same picture keeps its identifier. */
function identifier(...parts: readonly string[]): string {
  const digest = createHash('sha256').update(parts.join('\u0000')).digest().subarray(0, 16);
  // Version 8 (made by its user) and variant bits of RFC 9562, which X.667 asks to be a real UUID.
  digest[6] = ((digest[6] ?? 0) & 0x0f) | 0x80;
  digest[8] = ((digest[8] ?? 0) & 0x3f) | 0x80;
  return `2.25.${BigInt(`0x${digest.toString('hex')}`).toString()}`;
}

function littleEndian(pixels: Uint16Array): Buffer {
  const bytes = Buffer.alloc(pixels.length * 2);
  pixels.forEach((value, at) => bytes.writeUInt16LE(value, at * 2));
  return bytes;
}

// In the tongue of DICONDE (ASTM E2339) the patient is the component: 0010,0010 ComponentName, 0010,0020 ComponentIDNumber.
function componentElements(facts: DicondeFacts): Element[] {
  return [
    text(0x0008, 0x0080, 'LO', facts.company),
    text(0x0008, 0x0090, 'PN', ''),
    text(0x0008, 0x1070, 'PN', facts.operator),
    text(0x0010, 0x0010, 'PN', facts.componentName),
    text(0x0010, 0x0020, 'LO', facts.componentId),
    text(0x0010, 0x0030, 'DA', ''),
    text(0x0010, 0x0040, 'CS', ''),
    text(0x0010, 0x1000, 'LO', facts.serial),
  ];
}

function exposureElements(facts: DicondeFacts, pitchMm: string): Element[] {
  return [
    text(0x0018, 0x0015, 'CS', ''),
    text(0x0018, 0x0060, 'DS', facts.tubeVoltageKv),
    text(0x0018, 0x1110, 'DS', facts.sourceToDetectorMm),
    text(0x0018, 0x1150, 'IS', String(facts.exposureMs)),
    text(0x0018, 0x1164, 'DS', `${pitchMm}\\${pitchMm}`),
    text(0x0018, 0x7004, 'CS', 'DIRECT'),
    text(0x0018, 0x8151, 'DS', String(Number(facts.tubeCurrentMa) * 1000)),
  ];
}

function pictureElements(picture: GreyPicture): Element[] {
  return [
    text(0x0020, 0x0013, 'IS', '1'),
    text(0x0020, 0x0020, 'CS', ''),
    text(0x0020, 0x0062, 'CS', 'U'),
    short(0x0028, 0x0002, 1),
    text(0x0028, 0x0004, 'CS', 'MONOCHROME2'),
    short(0x0028, 0x0010, picture.height),
    short(0x0028, 0x0011, picture.width),
    short(0x0028, 0x0100, 16),
    short(0x0028, 0x0101, 16),
    short(0x0028, 0x0102, 15),
    short(0x0028, 0x0103, 0),
    text(0x0028, 0x0301, 'CS', 'NO'),
    // Linear in dose, more dose is a higher value: what measurements of image quality need.
    text(0x0028, 0x1040, 'CS', 'LIN'),
    [0x0028, 0x1041, 'SS', Buffer.from([1, 0])],
    text(0x0028, 0x1052, 'DS', '0'),
    text(0x0028, 0x1053, 'DS', '1'),
    text(0x0028, 0x1054, 'LO', 'US'),
    text(0x0028, 0x2110, 'CS', '00'),
    [0x7fe0, 0x0010, 'OW', littleEndian(picture.pixels)],
  ];
}

function generalElements(facts: DicondeFacts, instance: string): Element[] {
  const [date, time] = [facts.date.replaceAll('-', ''), facts.time.replaceAll(':', '')];
  const dates = [0x0020, 0x0021, 0x0022, 0x0023].map((element) => text(0x0008, element, 'DA', date));
  const times = [0x0030, 0x0031, 0x0032, 0x0033].map((element) => text(0x0008, element, 'TM', time));
  return [
    text(0x0008, 0x0005, 'CS', 'ISO_IR 192'),
    text(0x0008, 0x0008, 'CS', 'ORIGINAL\\PRIMARY'),
    text(0x0008, 0x0016, 'UI', storageClass),
    text(0x0008, 0x0018, 'UI', instance),
    ...dates,
    ...times,
    text(0x0008, 0x0050, 'SH', ''),
    text(0x0008, 0x0060, 'CS', 'DX'),
    text(0x0008, 0x0068, 'CS', 'FOR PROCESSING'),
    text(0x0008, 0x0070, 'LO', ''),
    text(0x0008, 0x103e, 'LO', facts.viewName),
    [0x0008, 0x2218, 'SQ', Buffer.alloc(0)],
    text(0x0020, 0x000d, 'UI', identifier('study', facts.componentId, facts.serial, facts.date)),
    text(0x0020, 0x000e, 'UI', identifier('series', facts.componentId, facts.serial, facts.date, facts.viewName)),
    text(0x0020, 0x0010, 'SH', '1'),
    text(0x0020, 0x0011, 'IS', '1'),
    [0x0040, 0x0555, 'SQ', Buffer.alloc(0)],
  ];
}

/** A radiograph as an uncompressed DICONDE file (explicit little endian), pixel values unchanged, pitch as ImagerPixelSpacing. */
export function dicondeFile(picture: GreyPicture, facts: DicondeFacts): Buffer {
  const pixels = createHash('sha256').update(littleEndian(picture.pixels)).digest('hex');
  const instance = identifier('image', facts.componentId, facts.serial, facts.date, facts.time, pixels);
  const pitchMm = String(picture.pixelPitchUm / 1000);
  const dataset = [
    ...generalElements(facts, instance),
    ...componentElements(facts),
    ...exposureElements(facts, pitchMm),
    ...pictureElements(picture),
  ];
  dataset.sort((one, other) => one[0] - other[0] || one[1] - other[1]);
  const meta = [
    [0x0002, 0x0001, 'OB', Buffer.from([0, 1])] as const,
    text(0x0002, 0x0002, 'UI', storageClass),
    text(0x0002, 0x0003, 'UI', instance),
    text(0x0002, 0x0010, 'UI', transferSyntax),
    text(0x0002, 0x0012, 'UI', identifier('implementation', 'demo pictures')),
  ];
  const metaBytes = Buffer.concat(meta.map(encoded));
  const metaLength = Buffer.alloc(4);
  metaLength.writeUInt32LE(metaBytes.length);
  const preamble = Buffer.concat([Buffer.alloc(128), Buffer.from('DICM')]);
  return Buffer.concat([preamble, encoded([0x0002, 0x0000, 'UL', metaLength]), metaBytes, ...dataset.map(encoded)]);
}
