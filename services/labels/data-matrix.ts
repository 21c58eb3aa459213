import { datamatrix } from 'bwip-js/node';

export interface CodeOutline {
  /** SVG path of the dark modules, one unit each; holes run the other way round, so that any fill rule paints them right. */
  readonly path: string;
  /** Modules on a side, without the quiet zone of one. */
  readonly modules: number;
}

/** A Data Matrix (ISO/IEC 16022, ECC 200) of a text as an outline. Throws when the text does not fit one. */
export function dataMatrixOutline(text: string): CodeOutline {
  let path = '';
  let modules = 0;
  const nothing = () => undefined;
  const options = { bcid: 'datamatrix', text, scale: 1, padding: 0 };
  datamatrix(options, {
    scale: () => [1, 1],
    measure: () => ({ width: 0, ascent: 0, descent: 0 }),
    init: (width: number) => {
      modules = width;
    },
    polygon: (points: [number, number][]) => {
      path += `M${points.map(([x, y]) => `${String(x)} ${String(y)}`).join('L')}z`;
    },
    line: nothing,
    hexagon: nothing,
    ellipse: nothing,
    fill: nothing,
    text: nothing,
    end: nothing,
  });
  if (modules === 0 || path === '') throw new Error(`No Data Matrix can hold "${text.slice(0, 80)}"`);
  return { path, modules };
}
