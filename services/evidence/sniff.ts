import { AdmissionRefused } from './admission-refused';

export type FileKind = 'png' | 'jpeg' | 'tiff' | 'dicom' | 'text' | 'pdf';

export const mediaTypes: Readonly<Record<FileKind, string>> = {
  png: 'image/png',
  jpeg: 'image/jpeg',
  tiff: 'image/tiff',
  dicom: 'application/dicom',
  text: 'text/csv',
  pdf: 'application/pdf',
};

const endings: Readonly<Record<string, FileKind>> = {
  png: 'png',
  jpg: 'jpeg',
  jpeg: 'jpeg',
  tif: 'tiff',
  tiff: 'tiff',
  dcm: 'dicom',
  dicom: 'dicom',
  csv: 'text',
  txt: 'text',
  pdf: 'pdf',
};

/** What a role of evidence may be. */
const allowed: Readonly<Record<string, readonly FileKind[]>> = {
  radiograph: ['dicom', 'tiff', 'png'],
  photograph: ['jpeg', 'png', 'tiff'],
  'reading-file': ['text'],
  document: ['pdf', 'png', 'jpeg', 'tiff', 'text'],
};

const spoken: Readonly<Record<FileKind, string>> = {
  png: 'PNG',
  jpeg: 'JPEG',
  tiff: 'TIFF',
  dicom: 'DICOM',
  text: 'text',
  pdf: 'PDF',
};

/** What the bytes are; the name only has to agree. Throws AdmissionRefused 'not-what-it-says' or, for an empty file, 'unreadable'. */
export function sniff(bytes: Buffer, declaredName: string, kind: string): FileKind {
  if (bytes.length === 0) throw new AdmissionRefused('unreadable', 'The file is empty.');
  refuseActive(bytes);
  const ending = /\.([a-z0-9]+)$/i.exec(declaredName)?.[1]?.toLowerCase();
  const said = ending === undefined ? undefined : endings[ending];
  const found = kindOf(bytes, said);
  if (!found) throw new AdmissionRefused('not-what-it-says', 'The bytes are none of PNG, JPEG, TIFF, DICOM, PDF or text.');
  if (said && said !== found) {
    throw new AdmissionRefused('not-what-it-says', `The name ends in .${ending ?? ''} but the bytes are ${spoken[found]}.`);
  }
  const wanted = allowed[kind] ?? [];
  if (!wanted.includes(found)) {
    const choices = wanted.map((one) => spoken[one]).join(', ');
    throw new AdmissionRefused(
      'not-what-it-says',
      `A ${kind} must be one of ${choices || 'nothing'}; the bytes are ${spoken[found]}.`,
    );
  }
  return found;
}

/**
 * DICOM leaves its first 128 bytes free (PS3.10 7.1), and some writers put a TIFF head there: such a file is DICOM
 * unless its name says TIFF, when it is refused as two things at once.
 */
function kindOf(bytes: Buffer, said: FileKind | undefined): FileKind | null {
  const starts = (...values: number[]) => values.every((value, index) => bytes[index] === value);
  if (starts(0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a)) return 'png';
  if (starts(0xff, 0xd8, 0xff)) return 'jpeg';
  if (starts(0x49, 0x49, 0x2a, 0) || starts(0x4d, 0x4d, 0, 0x2a) || starts(0x49, 0x49, 0x2b, 0) || starts(0x4d, 0x4d, 0, 0x2b)) {
    if (bytes.toString('latin1', 128, 132) !== 'DICM') return 'tiff';
    if (said === 'tiff') throw new AdmissionRefused('not-what-it-says', 'The file is TIFF and DICOM at once; send one of them.');
  }
  if (bytes.toString('latin1', 128, 132) === 'DICM') return 'dicom';
  if (bytes.toString('latin1', 0, 5) === '%PDF-') return 'pdf';
  return isText(bytes) ? 'text' : null;
}

// What a browser could run must never be stored under a harmless name.
function refuseActive(bytes: Buffer): void {
  const opening = bytes.toString('latin1', 0, 4096).replaceAll('\u0000', '').toLowerCase();
  if (/<svg[\s>:]/.test(opening))
    throw new AdmissionRefused('not-what-it-says', 'SVG is not taken: send the picture as PNG, JPEG or TIFF.');
  if (/<(!doctype html|html|script|iframe|body)[\s>]/.test(opening)) {
    throw new AdmissionRefused('not-what-it-says', 'The file holds HTML and is not taken as evidence.');
  }
  if (bytes.toString('latin1', 0, 2) === 'PK')
    throw new AdmissionRefused('not-what-it-says', 'Archives and office files are not taken: send the file itself.');
  if (/^\s*<\?xml/.test(opening)) throw new AdmissionRefused('not-what-it-says', 'XML is not taken as evidence.');
}

function isText(bytes: Buffer): boolean {
  try {
    const text = new TextDecoder('utf-8', { fatal: true }).decode(bytes);
    return !/[\u0000-\u0008\u000e-\u001f\u007f]/.test(text);
  } catch {
    return false;
  }
}
