import { AdmissionRefused } from './admission-refused';

/** Undoes RLE of DICOM PS3.5 annex G for one frame of one sample per pixel; answers little-endian bytes. */
export function undoRunLength(frame: Uint8Array, pixelCount: number, bytesPerPixel: 1 | 2): Buffer {
  const view = new DataView(frame.buffer, frame.byteOffset, frame.byteLength);
  if (frame.length < 64 || view.getUint32(0, true) !== bytesPerPixel) {
    throw new AdmissionRefused('unreadable', 'The run-length segments do not fit the pixel format.');
  }
  const out = Buffer.alloc(pixelCount * bytesPerPixel);
  for (let segment = 0; segment < bytesPerPixel; segment += 1) {
    const start = view.getUint32(4 + segment * 4, true);
    const end = segment + 1 < bytesPerPixel ? view.getUint32(8 + segment * 4, true) : frame.length;
    // The most significant byte comes first.
    const filled = fillSegment(frame.subarray(start, end), out, bytesPerPixel - 1 - segment, bytesPerPixel, pixelCount);
    if (filled < pixelCount) throw new AdmissionRefused('unreadable', 'The run-length data end before the picture does.');
  }
  return out;
}

function fillSegment(packed: Uint8Array, out: Buffer, offset: number, stride: number, pixelCount: number): number {
  let [at, done] = [0, 0];
  while (at < packed.length && done < pixelCount) {
    const control = packed[at] ?? 128;
    at += 1;
    if (control === 128) continue;
    const count = control < 128 ? control + 1 : 257 - control;
    for (let index = 0; index < count && done < pixelCount; index += 1) {
      const from = control < 128 ? at + index : at;
      if (from >= packed.length) return done;
      out[done * stride + offset] = packed[from] ?? 0;
      done += 1;
    }
    at += control < 128 ? count : 1;
  }
  return done;
}
