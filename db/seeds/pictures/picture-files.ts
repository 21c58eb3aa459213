import sharp, { type Sharp } from 'sharp';

/** Grey values of 16 bits, row 0 at the top. */
export interface GreyPicture {
  readonly pixels: Uint16Array;
  readonly width: number;
  readonly height: number;
  readonly pixelPitchUm: number;
}

/** Colours of 8 bits, red green blue, row 0 at the top. */
export interface ColourPicture {
  readonly pixels: Uint8ClampedArray;
  readonly width: number;
  readonly height: number;
}

function greyInput(picture: GreyPicture): Sharp {
  const raw = { width: picture.width, height: picture.height, channels: 1 as const };
  // Without grey16 sharp would answer 8 bits and three channels.
  return sharp(picture.pixels, { raw }).toColourspace('grey16');
}

/** PNG of 16 bits a pixel, values unchanged. */
export function greyPng(picture: GreyPicture): Promise<Buffer> {
  return greyInput(picture).png({ compressionLevel: 3 }).toBuffer();
}

/** TIFF of 16 bits a pixel, values unchanged, with its resolution in pixels per millimetre. */
export function greyTiff(picture: GreyPicture): Promise<Buffer> {
  const pixelsPerMm = 1000 / picture.pixelPitchUm;
  return greyInput(picture)
    .tiff({ compression: 'deflate', predictor: 'horizontal', xres: pixelsPerMm, yres: pixelsPerMm })
    .toBuffer();
}

function colourInput(picture: ColourPicture): Sharp {
  return sharp(picture.pixels, { raw: { width: picture.width, height: picture.height, channels: 3 } });
}

/** JPEG photograph: colours kept at full resolution, since an indication's hue is its evidence. */
export function photographJpeg(picture: ColourPicture): Promise<Buffer> {
  return colourInput(picture).jpeg({ quality: 92, chromaSubsampling: '4:4:4' }).toBuffer();
}
