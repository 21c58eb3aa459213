import type { DataSet } from 'dicom-parser';

/** Facts and the tag each comes from; component names are those of DICONDE (ASTM E2339: PatientName is ComponentName, from DCMTK's dictionary). */
const texts: Readonly<Record<string, string>> = {
  componentName: 'x00100010',
  componentId: 'x00100020',
  company: 'x00080080',
  modality: 'x00080060',
  studyDate: 'x00080020',
  acquisitionDate: 'x00080022',
  acquisitionTime: 'x00080032',
  contentDate: 'x00080023',
  manufacturer: 'x00080070',
  equipmentModel: 'x00081090',
  sopInstance: 'x00080018',
};

const numbers: Readonly<Record<string, string>> = {
  kV: 'x00180060',
  mA: 'x00181151',
  exposureTimeMs: 'x00181150',
  exposureMAs: 'x00181152',
  sourceToDetectorMm: 'x00181110',
  sourceToObjectMm: 'x00181111',
  focalSpotMm: 'x00181190',
};

/** What the header says of the exposure, as found; empty and unreadable values are left out. */
export function dicomFacts(data: DataSet): Record<string, string | number> {
  const facts: Record<string, string | number> = {};
  for (const [name, tag] of Object.entries(texts)) {
    const text = textOf(data, tag);
    if (text) facts[name] = text;
  }
  for (const [name, tag] of Object.entries(numbers)) {
    const value = Number(data.string(tag)?.split('\\')[0] || Number.NaN);
    if (Number.isFinite(value)) facts[name] = value;
  }
  return facts;
}

/** Micrometres per pixel and which attribute says so: at the object where calibrated (0028,0030), otherwise at the detector (0018,1164). */
export function dicomPitch(data: DataSet): { readonly pitchUm: number; readonly source: string } | null {
  for (const [tag, source] of [
    ['x00280030', 'PixelSpacing'],
    ['x00181164', 'ImagerPixelSpacing'],
  ] as const) {
    const [row, column] = (data.string(tag) ?? '').split('\\').map(Number);
    // A picture with unequal pitches has no single scale: marks on it would be wrong in one direction.
    if (row !== undefined && row > 0 && row === column) return { pitchUm: Number((row * 1000).toPrecision(12)), source };
  }
  return null;
}

// dicom-parser reads every string as Latin-1, whatever the file says.
function textOf(data: DataSet, tag: string): string | null {
  const element = data.elements[tag];
  if (!element || element.length === 0 || element.dataOffset + element.length > data.byteArray.length) return null;
  const bytes = data.byteArray.slice(element.dataOffset, element.dataOffset + element.length);
  const charset = data.string('x00080005') ?? '';
  const label = charset.includes('ISO_IR 192') ? 'utf-8' : charset.includes('GB18030') ? 'gb18030' : 'latin1';
  return new TextDecoder(label).decode(bytes).replaceAll('\u0000', '').trim().slice(0, 200);
}
