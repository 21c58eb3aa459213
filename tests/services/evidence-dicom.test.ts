import { execFileSync } from 'node:child_process';
import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { AdmissionRefused } from '@/services/evidence/admission-refused';
import { decodeDicom } from '@/services/evidence/decode-dicom';

// External truth: pydicom of Debian (python3-pydicom), its sample files and its reading of their pixels.
const folder = '/usr/lib/python3/dist-packages/pydicom/data/test_files';
const read = [
  'CT_small',
  'MR_small',
  'MR_small_implicit',
  'MR_small_bigendian',
  'MR_small_RLE',
  'MR_small_expb',
  'MR_small_padded',
  'image_dfl',
];
const refused: Record<string, RegExp> = {
  MR_small_jp2klossless: /JPEG 2000 Lossless/,
  MR_small_jpeg_ls_lossless: /JPEG-LS Lossless/,
  JPGExtended: /JPEG Extended/,
  JPEG2000: /JPEG 2000/,
  MR_truncated: /cut off/,
  SC_rgb_rle: /monochrome/,
  rtplan: /no picture/,
};

// Debian's pydicom comes without NumPy: it undoes syntax and deflation, the words are read by Python's own struct.
const script = `
import sys, struct, pydicom
d = pydicom.dcmread(sys.argv[1])
count = d.Rows * d.Columns
letter = 'B' if d.BitsAllocated == 8 else ('h' if d.PixelRepresentation else 'H')
values = struct.unpack(('<' if d.is_little_endian else '>') + str(count) + letter, d.PixelData[:count * d.BitsAllocated // 8])
print(d.PixelRepresentation, *values)`;

function pydicomPixels(name: string): number[] {
  const answer = execFileSync('/usr/bin/python3', ['-c', script, `${folder}/${name}.dcm`], { maxBuffer: 1e9 });
  return answer.toString().trim().split(' ').map(Number);
}

function refusalOf(bytes: Buffer): unknown {
  try {
    return decodeDicom(bytes);
  } catch (error) {
    return error;
  }
}

describe('DICOM against pydicom', () => {
  it.for(read)('%s: every pixel is the same', (name, context) => {
    if (!existsSync(folder)) context.skip('python3-pydicom is not installed');
    // The README of the samples: MR_small_RLE is MR_small in another transfer syntax.
    const [signed, ...truth] = pydicomPixels(name === 'MR_small_RLE' ? 'MR_small' : name);
    const { grey } = decodeDicom(readFileSync(`${folder}/${name}.dcm`));
    const offset = signed === 1 ? 32768 : 0;
    expect(Array.from(grey.pixels, (value) => value - offset)).toEqual(truth);
  });

  it.for(Object.entries(refused))('%s is refused by name', ([name, sentence], context) => {
    if (!existsSync(folder)) context.skip('python3-pydicom is not installed');
    const refusal = refusalOf(readFileSync(`${folder}/${name}.dcm`));
    expect(refusal).toBeInstanceOf(AdmissionRefused);
    expect((refusal as AdmissionRefused).message).toMatch(sentence);
  });

  it('every sample file is either read or refused with a sentence, never anything else', (context) => {
    if (!existsSync(folder)) context.skip('python3-pydicom is not installed');
    const files = readdirSync(folder).filter((name) => name.endsWith('.dcm'));
    const wrong = files.filter((name) => {
      const answer = refusalOf(readFileSync(`${folder}/${name}`));
      return answer instanceof Error && !(answer instanceof AdmissionRefused);
    });
    expect(files.length).toBeGreaterThan(40);
    expect(wrong).toEqual([]);
  });
});
