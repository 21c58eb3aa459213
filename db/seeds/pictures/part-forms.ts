/** A place on a view in whole micrometres: x to the right, y upwards, from the lower left corner of the frame. */
export type PlaceUm = readonly [xUm: number, yUm: number];

/** The frame that every nominal view, radiograph and photograph of the demo parts shares: 70 mm × 50 mm. */
export const frameUm = { width: 70_000, height: 50_000 } as const;

export const demoPartNumbers = ['AM-2210', 'AM-3175', 'AM-4402'] as const;
export type DemoPartNumber = (typeof demoPartNumbers)[number];

export const demoViews = ['concave', 'convex'] as const;
export type DemoView = (typeof demoViews)[number];

/** A cored passage: `from` and `to` are fractions of the chord from the leading edge, spans are fractions of the airfoil's span. */
export interface CavityForm {
  readonly from: number;
  readonly to: number;
  readonly wallUm: number;
  readonly spanFrom: number;
  readonly spanTo: number;
  /** Slanting ribs on the walls that stir the cooling air. */
  readonly ribbed: boolean;
  /** Rows of pins from wall to wall, from this fraction of the chord on. */
  readonly pinsFrom?: number;
}

/** An airfoil seen broadside. Edges are given at the start, middle and end of the span, across the span axis. */
export interface AirfoilForm {
  readonly spanAxis: 'x' | 'y';
  readonly startUm: number;
  readonly endUm: number;
  readonly leadingUm: readonly [number, number, number];
  readonly trailingUm: readonly [number, number, number];
  readonly thickestUm: number;
  readonly cavities: readonly CavityForm[];
  /** True where metal (a platform) closes the far end of the span. */
  readonly closedAtEnd: boolean;
}

/** A root or platform: its outline as a path that begins and ends on the airfoil's side, and its depth along the beam. */
export interface BlockForm {
  readonly zone: string;
  readonly path: readonly PlaceUm[];
  readonly depthUm: number;
}

export interface PartForm {
  readonly partNumber: DemoPartNumber;
  readonly title: string;
  /** At the start of the span first (inner platform or root), then at its end. */
  readonly blocks: readonly BlockForm[];
  readonly airfoils: readonly AirfoilForm[];
  /** Where the lowest wire of the indicator lies; the wires reach from the metal out into the open beam. */
  readonly indicatorAt: PlaceUm;
}

const millimetres = (...places: readonly (readonly [number, number])[]): PlaceUm[] =>
  places.map(([x, y]) => [Math.round(x * 1000), Math.round(y * 1000)]);

const firstStageVane: PartForm = {
  partNumber: 'AM-2210',
  title: 'First-stage vane',
  blocks: [
    {
      zone: 'A2',
      depthUm: 13_000,
      path: millimetres(
        [11, 11],
        [11, 7.6],
        [15, 7.6],
        [15, 5.2],
        [19, 5.2],
        [19, 7.6],
        [52, 7.6],
        [52, 5.2],
        [56, 5.2],
        [56, 7.6],
        [59, 7.6],
        [59, 11],
      ),
    },
    {
      zone: 'A1',
      depthUm: 15_000,
      path: millimetres(
        [62, 40],
        [62, 43.6],
        [59, 43.6],
        [59, 47],
        [55, 47],
        [55, 43.6],
        [16, 43.6],
        [16, 47],
        [12, 47],
        [12, 43.6],
        [8, 43.6],
        [8, 40],
      ),
    },
  ],
  airfoils: [
    {
      spanAxis: 'y',
      startUm: 11_000,
      endUm: 40_000,
      leadingUm: [17_500, 16_300, 15_500],
      trailingUm: [50_000, 51_200, 53_000],
      thickestUm: 8_200,
      closedAtEnd: true,
      cavities: [
        { from: 0.055, to: 0.4, wallUm: 1_150, spanFrom: -0.3, spanTo: 1.3, ribbed: true },
        { from: 0.45, to: 0.86, wallUm: 1_050, spanFrom: -0.3, spanTo: 1.3, ribbed: false, pinsFrom: 0.64 },
      ],
    },
  ],
  indicatorAt: [46_500, 17_500],
};

const thirdStageBlade: PartForm = {
  partNumber: 'AM-3175',
  title: 'Third-stage blade',
  blocks: [
    {
      zone: 'A',
      depthUm: 14_500,
      path: millimetres(
        [24.5, 41],
        [21.8, 41],
        [21.3, 36.5],
        [19, 35.2],
        [18.2, 36.6],
        [16, 36.8],
        [14.6, 33.8],
        [13.2, 32.8],
        [12.4, 34.2],
        [10.4, 34.4],
        [9, 31.4],
        [7.8, 30.6],
        [7, 31.6],
        [5.4, 31.2],
        [4.6, 29],
        [4.6, 21],
        [5.4, 18.8],
        [7, 18.4],
        [7.8, 19.4],
        [9, 18.6],
        [10.4, 15.6],
        [12.4, 15.8],
        [13.2, 17.2],
        [14.6, 16.2],
        [16, 13.2],
        [18.2, 13.4],
        [19, 14.8],
        [21.3, 13.5],
        [21.8, 9],
        [24.5, 9],
      ),
    },
  ],
  airfoils: [
    {
      spanAxis: 'x',
      startUm: 24_500,
      endUm: 64_500,
      leadingUm: [12_600, 13_900, 15_800],
      trailingUm: [38_000, 36_600, 35_000],
      thickestUm: 6_200,
      closedAtEnd: false,
      cavities: [
        { from: 0.05, to: 0.27, wallUm: 950, spanFrom: -0.6, spanTo: 0.95, ribbed: true },
        { from: 0.315, to: 0.565, wallUm: 950, spanFrom: -0.6, spanTo: 0.93, ribbed: true },
        { from: 0.61, to: 0.87, wallUm: 900, spanFrom: -0.6, spanTo: 0.95, ribbed: false, pinsFrom: 0.7 },
      ],
    },
  ],
  indicatorAt: [57_500, 30_000],
};

function pairAirfoil(leading: number): AirfoilForm {
  return {
    spanAxis: 'y',
    startUm: 11_500,
    endUm: 39_500,
    leadingUm: [leading, leading - 500, leading - 800],
    trailingUm: [leading + 18_600, leading + 18_900, leading + 19_600],
    thickestUm: 5_000,
    closedAtEnd: true,
    cavities: [{ from: 0.1, to: 0.7, wallUm: 1_000, spanFrom: -0.35, spanTo: 1.3, ribbed: false }],
  };
}

const guideVanePair: PartForm = {
  partNumber: 'AM-4402',
  title: 'Guide-vane pair',
  blocks: [
    {
      zone: 'A2',
      depthUm: 10_000,
      path: millimetres([5, 11.5], [5, 8.4], [9, 8.4], [9, 5.6], [55, 5.6], [55, 8.4], [59, 8.4], [59, 11.5]),
    },
    {
      zone: 'A1',
      depthUm: 12_000,
      path: millimetres(
        [61, 39.5],
        [61, 42.4],
        [57, 42.4],
        [57, 46],
        [54, 46],
        [54, 42.4],
        [11, 42.4],
        [11, 46],
        [8, 46],
        [8, 42.4],
        [4, 42.4],
        [4, 39.5],
      ),
    },
  ],
  airfoils: [pairAirfoil(8_600), pairAirfoil(34_600)],
  indicatorAt: [47_500, 17_500],
};

/** Nominal form of a demo part, seen from its concave side. */
export function partForm(partNumber: DemoPartNumber): PartForm {
  return { 'AM-2210': firstStageVane, 'AM-3175': thirdStageBlade, 'AM-4402': guideVanePair }[partNumber];
}
