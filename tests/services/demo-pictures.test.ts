import { execFileSync, spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import sharp from 'sharp';
import { afterAll, describe, expect, it } from 'vitest';
import { dicondeFile } from '@/db/seeds/pictures/diconde-file';
import type { RadiographicFlaw } from '@/db/seeds/pictures/known-flaws';
import { wanderingLine } from '@/db/seeds/pictures/known-flaws';
import { demoPartNumbers, frameUm, type PlaceUm } from '@/db/seeds/pictures/part-forms';
import { criteriaZones, partViewPng, partViews } from '@/db/seeds/pictures/part-view';
import { penetrantPhotograph, type PenetrantSettings } from '@/db/seeds/pictures/penetrant';
import { greyPng, greyTiff, photographJpeg } from '@/db/seeds/pictures/picture-files';
import { radiograph, type RadiographSettings } from '@/db/seeds/pictures/radiograph';
import { randomFrom } from '@/db/seeds/pictures/seeded-random';
import { thicknessCsv, thicknessFileForms } from '@/db/seeds/pictures/thickness-csv';
import { planView } from '@/services/contracts/plan-content';

const folder = mkdtempSync(join(tmpdir(), 'demo-pictures-'));
afterAll(() => {
  rmSync(folder, { recursive: true });
});

const plain: RadiographSettings = {
  partNumber: 'AM-2210',
  view: 'concave',
  serial: 'S0417',
  seed: 11,
  pixelPitchUm: 50,
  flaws: [],
};
const noiseless = { quantaPerPixel: 1e12, blurUm: 0 } as const;
// In the solid rib between the two passages, where there is more metal than any flaw is deep.
const rib: PlaceUm = [31_150, 25_500];

/** Sum over the picture of the change in attenuation line integral, as metal volume in µm³: the inverse of exp(−µt) with scatter. */
function missingMetal(withFlaw: RadiographSettings, without: RadiographSettings): { volume: number; changed: PlaceUm[] } {
  const [holed, whole] = [radiograph(withFlaw), radiograph(without)];
  const pitch = holed.pixelPitchUm;
  let volume = 0;
  const changed: PlaceUm[] = [];
  const openBeam = 54_000;
  const [attenuationPerUm, scatter] = [0.155e-3, 0.025];
  holed.pixels.forEach((value, at) => {
    const before = whole.pixels[at] ?? 0;
    if (Math.abs(value - before) < 3) return;
    const column = at % holed.width;
    const row = Math.floor(at / holed.width);
    // The beam's fall to the edges, as the generator states it.
    const fall = 1 - 0.09 * ((column / holed.width - 0.53) ** 2 + ((row - 0.46 * holed.height) / holed.width) ** 2);
    const direct = (grey: number): number => (grey / openBeam / fall - scatter) / (1 - scatter);
    volume += (Math.log(direct(value) / direct(before)) / attenuationPerUm) * pitch * pitch;
    changed.push([(column + 0.5) * pitch, frameUm.height - (row + 0.5) * pitch]);
  });
  return { volume, changed };
}

describe('a demo radiograph', () => {
  it('has the same pixels for the same settings and others for another seed', () => {
    const first = radiograph(plain);
    expect(Buffer.compare(Buffer.from(first.pixels.buffer), Buffer.from(radiograph(plain).pixels.buffer))).toBe(0);
    expect(
      Buffer.compare(Buffer.from(first.pixels.buffer), Buffer.from(radiograph({ ...plain, seed: 12 }).pixels.buffer)),
    ).not.toBe(0);
    expect([first.width, first.height]).toEqual([1400, 1000]);
  });

  // Truth: the volume of a sphere, π d³ / 6.
  it.each([300, 700, 1200])('lacks exactly the metal of a pore of %i µm, inside the marked circle', (diameterUm) => {
    const flaws: RadiographicFlaw[] = [{ type: 'gas-pore', center: rib, diameterUm }];
    const { volume, changed } = missingMetal({ ...plain, ...noiseless, flaws }, { ...plain, ...noiseless });
    expect(volume / ((Math.PI * diameterUm ** 3) / 6)).toBeGreaterThan(0.97);
    expect(volume / ((Math.PI * diameterUm ** 3) / 6)).toBeLessThan(1.03);
    for (const [x, y] of changed) expect(Math.hypot(x - rib[0], y - rib[1])).toBeLessThanOrEqual(diameterUm / 2 + 36);
    expect(radiograph({ ...plain, flaws }).truth).toEqual([
      { type: 'gas-pore', view: 'concave', shape: { kind: 'circle', center: rib, diameter: diameterUm } },
    ]);
  });

  it('changes only what lies under a crack, a shrinkage cluster and an inclusion, and says where', () => {
    const points = wanderingLine(randomFrom(4), [30_700, 18_000], [31_600, 22_000], 7, 60);
    const flaws: RadiographicFlaw[] = [
      { type: 'crack', points, widthUm: 90, depthUm: 1200 },
      { type: 'shrinkage', center: [31_000, 30_000], axesUm: [3000, 1200], angle: 80, voids: 25 },
      { type: 'inclusion', center: [31_200, 35_000], axesUm: [1200, 400], angle: 90, density: 'denser' },
    ];
    for (const flaw of flaws) {
      const { volume, changed } = missingMetal({ ...plain, ...noiseless, flaws: [flaw] }, { ...plain, ...noiseless });
      const known = radiograph({ ...plain, flaws: [flaw] }).truth[0];
      expect(known?.type).toBe(flaw.type);
      expect(changed.length).toBeGreaterThan(20);
      expect(Math.sign(volume)).toBe(flaw.type === 'inclusion' ? -1 : 1);
      const ys = changed.map(([, y]) => y);
      const [low, high] =
        flaw.type === 'crack' ? [18_000, 22_000] : flaw.type === 'shrinkage' ? [28_500, 31_500] : [34_400, 35_600];
      expect(Math.min(...ys)).toBeGreaterThan(low - 150);
      expect(Math.max(...ys)).toBeLessThan(high + 150);
    }
  });

  // Truth: counting statistics. The ratio of mean to standard deviation of N counts is √N.
  it('has the noise of its counts in the open beam', () => {
    const picture = radiograph({ ...plain, quantaPerPixel: 10_000 });
    const ratios: number[] = [];
    for (let row = 300; row < 700; row += 1) {
      const line = Array.from(picture.pixels.subarray(row * picture.width + 20, row * picture.width + 75));
      const mean = line.reduce((sum, value) => sum + value, 0) / line.length;
      const variance = line.reduce((sum, value) => sum + (value - mean) ** 2, 0) / (line.length - 1);
      ratios.push(mean / Math.sqrt(variance));
    }
    const median = ratios.sort((one, other) => one - other)[200] ?? 0;
    expect(median).toBeGreaterThan(95);
    expect(median).toBeLessThan(106);
  });

  // Truth: cross-section of a wire, π d² / 4, with the diameters of ISO 19232-1.
  it('shows each wire of the indicator with its own metal', () => {
    const bare = radiograph({ ...plain, ...noiseless, indicator: null });
    const wired = radiograph({ ...plain, ...noiseless });
    expect(wired.wires.map(({ diameterUm }) => diameterUm)).toEqual([400, 320, 250, 200, 160, 125, 100]);
    for (const wire of wired.wires) {
      // In the open beam near the free end, clear of the part.
      const column = Math.round((wire.to[0] - 1000) / 50);
      const middle = Math.round((frameUm.height - wire.from[1]) / 50);
      let area = 0;
      for (let row = middle - 8; row <= middle + 8; row += 1) {
        const at = row * wired.width + column;
        const share = (wired.pixels[at] ?? 0) / (bare.pixels[at] ?? 1);
        area += (-Math.log((share - 0.025) / 0.975) / 0.155e-3) * 50;
      }
      expect(area / ((Math.PI * wire.diameterUm ** 2) / 4)).toBeGreaterThan(0.95);
      expect(area / ((Math.PI * wire.diameterUm ** 2) / 4)).toBeLessThan(1.05);
    }
  });

  it('spells its serial in lead: another serial changes only the line of letters', () => {
    const [one, other] = [radiograph({ ...plain, ...noiseless }), radiograph({ ...plain, ...noiseless, serial: 'S0418' })];
    const rows = new Set<number>();
    one.pixels.forEach((value, at) => {
      if (value !== other.pixels[at]) rows.add(Math.floor(at / one.width));
    });
    expect(rows.size).toBeGreaterThan(30);
    expect(Math.min(...rows)).toBeGreaterThan((frameUm.height - 4_200) / 50);
    expect(() => radiograph({ ...plain, serial: 'S0417é' })).toThrow(RangeError);
  });

  it('refuses a truth that is not in whole micrometres or has no size', () => {
    expect(() => radiograph({ ...plain, flaws: [{ type: 'gas-pore', center: [31_150.5, 25_500], diameterUm: 700 }] })).toThrow(
      RangeError,
    );
    expect(() => radiograph({ ...plain, flaws: [{ type: 'gas-pore', center: rib, diameterUm: 0 }] })).toThrow(RangeError);
    expect(() => radiograph({ ...plain, flaws: [{ type: 'crack', points: [rib], widthUm: 50, depthUm: 500 }] })).toThrow(
      RangeError,
    );
  });
});

describe('files of a radiograph', () => {
  const picture = radiograph({ ...plain, pixelPitchUm: 100 });

  it.each([
    ['PNG', greyPng],
    ['TIFF', greyTiff],
  ] as const)('keep every 16-bit value in %s and have the same bytes again', async (_, write) => {
    const file = await write(picture);
    const { data, info } = await sharp(file)
      .toColourspace('grey16')
      .raw({ depth: 'ushort' })
      .toBuffer({ resolveWithObject: true });
    expect([info.width, info.height, info.channels]).toEqual([700, 500, 1]);
    expect(Buffer.compare(data, Buffer.from(picture.pixels.buffer))).toBe(0);
    expect(Buffer.compare(file, await write(picture))).toBe(0);
  });

  // A reader that shares no code with the writer: ImageMagick.
  it('are read alike by ImageMagick', async (context) => {
    if (spawnSync('convert', ['-version']).error) context.skip('ImageMagick is not installed');
    for (const [ending, write] of [
      ['png', greyPng],
      ['tif', greyTiff],
    ] as const) {
      const path = join(folder, `grey.${ending}`);
      writeFileSync(path, await write(picture));
      const found = spawnSync('convert', [path, '-depth', '16', '-endian', 'LSB', 'gray:-'], { maxBuffer: 1 << 26 });
      expect(Buffer.compare(found.stdout, Buffer.from(picture.pixels.buffer))).toBe(0);
    }
  });
});

describe('a DICONDE file', () => {
  const picture = radiograph({ ...plain, pixelPitchUm: 100 });
  const facts = {
    componentName: 'First-stage vane',
    componentId: 'AM-2210',
    serial: 'S0417',
    company: 'Aldermoor Precision Castings',
    operator: 'Ostrow^Lena',
    date: '2026-03-09',
    time: '14:05:06',
    tubeVoltageKv: '200',
    tubeCurrentMa: '4.5',
    exposureMs: 12_000,
    sourceToDetectorMm: '1000',
    viewName: 'concave',
  } as const;
  const path = join(folder, 'radiograph.dcm');
  const file = dicondeFile(picture, facts);
  writeFileSync(path, file);

  it('has the same bytes again', () => {
    expect(Buffer.compare(file, dicondeFile(picture, facts))).toBe(0);
  });

  it('is read without complaint by dcmdump', (context) => {
    if (spawnSync('dcmdump', ['--version']).error) context.skip('dcmdump is not installed');
    const found = spawnSync('dcmdump', ['--print-all', '--print-short', path], { encoding: 'utf8', maxBuffer: 1 << 26 });
    expect([found.status, found.stderr]).toEqual([0, '']);
    const expected = [
      /\(0002,0010\) UI =LittleEndianExplicit/,
      /\(0008,0020\) DA \[20260309\]/,
      /\(0008,0060\) CS \[DX\]/,
      /\(0010,0010\) PN \[First-stage vane\]/,
      /\(0010,0020\) LO \[AM-2210\]/,
      /\(0010,1000\) LO \[S0417\]/,
      /\(0018,0060\) DS \[200\]/,
      /\(0018,1150\) IS \[12000\]/,
      /\(0018,1164\) DS \[0\.1\\0\.1\]/,
      /\(0018,8151\) DS \[4500\]/,
      /\(0028,0010\) US 500/,
      /\(0028,0011\) US 700/,
    ];
    for (const line of expected) expect(found.stdout).toMatch(line);
  });

  it('gives pydicom exactly the pixels that were written', (context) => {
    const python = '/usr/bin/python3';
    if (!existsSync(python) || spawnSync(python, ['-c', 'import pydicom']).status !== 0) context.skip('pydicom is not installed');
    const program =
      'import sys, pydicom; d = pydicom.dcmread(sys.argv[1]); assert d.Rows == 500 and d.Columns == 700; sys.stdout.buffer.write(d.PixelData)';
    const pixels = execFileSync(python, ['-c', program, path], { maxBuffer: 1 << 26 });
    expect(Buffer.compare(pixels, Buffer.from(picture.pixels.buffer))).toBe(0);
  });
});

describe('a demo penetrant photograph', () => {
  const settings: PenetrantSettings = {
    partNumber: 'AM-2210',
    view: 'concave',
    serial: 'S0417',
    seed: 5,
    pixelPitchUm: 50,
    indications: [
      { type: 'gas-pore', shape: { kind: 'circle', center: [32_000, 26_000], diameter: 1200 }, brightness: 1 },
      {
        type: 'crack',
        shape: {
          kind: 'polyline',
          points: [
            [22_000, 20_000],
            [24_000, 21_500],
            [26_000, 22_000],
          ],
          width: 200,
        },
        brightness: 1,
      },
    ],
  };
  const photograph = penetrantPhotograph(settings);
  const colourAt = ([xUm, yUm]: PlaceUm): [number, number, number] => {
    const at = (Math.floor((frameUm.height - yUm) / 50) * photograph.width + Math.floor(xUm / 50)) * 3;
    return [photograph.pixels[at] ?? 0, photograph.pixels[at + 1] ?? 0, photograph.pixels[at + 2] ?? 0];
  };

  it('has the same bytes for the same settings, also as JPEG', async () => {
    const again = penetrantPhotograph(settings);
    expect(Buffer.compare(Buffer.from(photograph.pixels.buffer), Buffer.from(again.pixels.buffer))).toBe(0);
    expect(Buffer.compare(await photographJpeg(photograph), await photographJpeg(again))).toBe(0);
    expect((await sharp(await photographJpeg(photograph)).metadata()).chromaSubsampling).toBe('4:4:4');
  });

  it('glows yellow-green at each indication on a dark violet part', () => {
    for (const place of [
      [32_000, 26_000],
      [24_000, 21_500],
    ] as const) {
      const [red, green, blue] = colourAt(place);
      expect(green).toBeGreaterThan(190);
      expect(green).toBeGreaterThan(red);
      expect(red).toBeGreaterThan(blue);
    }
    const [red, green, blue] = colourAt([40_000, 32_000]);
    expect(blue).toBeGreaterThan(green);
    expect(Math.max(red, green, blue)).toBeLessThan(120);
    expect(Math.max(...colourAt([3_000, 25_000]))).toBeLessThan(40);
  });

  it('shows a rounded bleed-out as wide as its truth says, to a pixel on either side', () => {
    const row = Array.from({ length: 80 }, (_, step) => colourAt([30_000 + step * 50 + 25, 26_000])[1]);
    const half = (Math.max(...row) + Math.min(...row)) / 2;
    const widthUm = row.filter((green) => green > half).length * 50;
    expect(Math.abs(widthUm - 1200)).toBeLessThanOrEqual(100);
    expect(photograph.truth.map(({ type, shape }) => [type, shape])).toEqual(
      settings.indications.map(({ type, shape }) => [type, shape]),
    );
  });
});

describe('files of thickness readings', () => {
  const readings = [
    { station: 1, value: '0.90' },
    { station: 12, value: '1.052' },
  ];

  it('keep the digits in every declared form', () => {
    const written = Object.fromEntries(
      Object.entries(thicknessFileForms).map(([name, form]) => [name, thicknessCsv(readings, form).toString('utf8')]),
    );
    expect(written).toEqual({
      'comma-point': 'station,thickness_mm\n1,0.90\n12,1.052\n',
      'semicolon-comma': '\ufeffStation;Thickness mm\r\n1;0,90\r\n12;1,052\r\n',
      'semicolon-point': 'Station;Thickness mm\r\n1;0.90\r\n12;1.052\r\n',
      'tab-comma': 'Poste\tEpaisseur mm\r\n1\t0,90\r\n12\t1,052\r\n',
    });
  });

  it('are refused where they could not be read back', () => {
    const form = thicknessFileForms['comma-point'];
    expect(() => thicknessCsv(readings, { ...form, decimal: ',' })).toThrow(RangeError);
    expect(() => thicknessCsv([{ station: 1.5, value: '0.9' }], form)).toThrow(RangeError);
    expect(() => thicknessCsv([{ station: 1, value: '0,9' }], form)).toThrow(RangeError);
  });
});

function areaOf(polygon: readonly PlaceUm[]): number {
  const doubled = polygon.reduce((sum, [x, y], at) => {
    const [nextX, nextY] = polygon[(at + 1) % polygon.length] ?? [x, y];
    return sum + x * nextY - nextX * y;
  }, 0);
  return Math.abs(doubled) / 2;
}

function crosses(a: PlaceUm, b: PlaceUm, c: PlaceUm, d: PlaceUm): boolean {
  const side = (p: PlaceUm, q: PlaceUm, r: PlaceUm): number =>
    Math.sign((q[0] - p[0]) * (r[1] - p[1]) - (q[1] - p[1]) * (r[0] - p[0]));
  return side(a, b, c) * side(a, b, d) < 0 && side(c, d, a) * side(c, d, b) < 0;
}

function isSimple(polygon: readonly PlaceUm[]): boolean {
  const edges = polygon.map((place, at) => [place, polygon[(at + 1) % polygon.length] ?? place] as const);
  return edges.every(([a, b], at) => edges.slice(at + 1).every(([c, d]) => !crosses(a, b, c, d)));
}

describe.each(demoPartNumbers)('views of %s', (partNumber) => {
  it('are views that a plan takes, with simple outlines and zones inside the frame', () => {
    for (const view of partViews[partNumber]) {
      const { widthUm, heightUm, title, outline } = view;
      expect(planView.safeParse({ name: view.view, title, widthUm, heightUm, outline }).error).toBeUndefined();
      for (const polygon of [outline, ...view.zones.map((zone) => zone.polygon)]) {
        expect(isSimple(polygon)).toBe(true);
        expect(polygon.flat().every((value) => Number.isInteger(value))).toBe(true);
        expect(polygon.every(([x, y]) => x >= 0 && x <= widthUm && y >= 0 && y <= heightUm)).toBe(true);
      }
      expect(new Set(view.zones.map((zone) => zone.letter))).toEqual(new Set(['A', 'B', 'C']));
    }
    const ids = criteriaZones(partNumber).map((zone) => zone.id);
    expect(new Set(ids).size).toBe(ids.length);
  });

  it('leave no metal without a zone: the zones add up to the outline, less the gap between the vanes of a pair', () => {
    for (const view of partViews[partNumber]) {
      const zones = view.zones.reduce((sum, zone) => sum + areaOf(zone.polygon), 0);
      // The gap of AM-4402: 28 mm high, its sides parabolas (Simpson's rule is exact), 26 mm pitch less the chord.
      const gap = partNumber === 'AM-4402' ? 28_000 * (26_000 - (18_600 + 4 * 19_400 + 20_400) / 6) : 0;
      // Ten straight pieces for each parabola leave about a micrometre along 28 mm; without a gap nothing is left over.
      expect(Math.abs(areaOf(view.outline) - zones - gap)).toBeLessThan(1 + gap * 0.002);
    }
  });

  it('are drawn with the same bytes each time, at 50 µm a pixel', async () => {
    const drawing = await partViewPng(partNumber, 'convex');
    const { width, height } = await sharp(drawing).metadata();
    expect([width, height]).toEqual([1400, 1000]);
    expect(Buffer.compare(drawing, await partViewPng(partNumber, 'convex'))).toBe(0);
    expect(Buffer.compare(drawing, await partViewPng(partNumber, 'concave'))).not.toBe(0);
  });
});
