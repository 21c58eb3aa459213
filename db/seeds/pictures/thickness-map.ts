import { type AirfoilForm, type BlockForm, frameUm, type PartForm } from './part-forms';
import { cavityDepthUm, placeOnAirfoil, solidThicknessUm } from './part-geometry';
import { type PixelGrid, widelyBlurred } from './pixel-grid';
import { type BoxUm, frameGrid, polygonCoverage } from './shape-raster';

const filletUm = 1_600;

/** Metal and open passage along the beam at each pixel, in micrometres. */
export interface ThicknessMap {
  readonly metal: PixelGrid;
  /** Depth of cavities, so that something left inside one can be put there. */
  readonly open: PixelGrid;
  /** Outer envelope: what the metal would be were the part solid; its slope is the surface that a camera sees. */
  readonly envelope: PixelGrid;
}

function filletedUm(airfoil: AirfoilForm, span: number, solidUm: number): number {
  const lengthUm = airfoil.endUm - airfoil.startUm;
  const fromStartUm = span * lengthUm;
  const fromEndUm = airfoil.closedAtEnd ? (1 - span) * lengthUm : filletUm;
  const nearUm = Math.min(fromStartUm, fromEndUm);
  return nearUm >= filletUm ? solidUm : solidUm + 3_200 * (1 - nearUm / filletUm) ** 2;
}

/** The part of the view that an airfoil and its passages can reach. */
function reachUm(airfoil: AirfoilForm): BoxUm {
  const lengthUm = airfoil.endUm - airfoil.startUm;
  const along = [airfoil.startUm - 0.7 * lengthUm, airfoil.endUm + 0.4 * lengthUm] as const;
  const edges = [...airfoil.leadingUm, ...airfoil.trailingUm];
  const across = [Math.min(...edges) - 500, Math.max(...edges) + 500] as const;
  const [x, y] = airfoil.spanAxis === 'x' ? [along, across] : [across, along];
  return { left: x[0], right: x[1], bottom: y[0], top: y[1] };
}

function addAirfoil(airfoil: AirfoilForm, pixelPitchUm: number, envelope: PixelGrid, open: PixelGrid): void {
  const box = reachUm(airfoil);
  const firstColumn = Math.max(0, Math.floor(box.left / pixelPitchUm));
  const lastColumn = Math.min(envelope.width - 1, Math.ceil(box.right / pixelPitchUm));
  for (let row = 0; row < envelope.height; row += 1) {
    const yUm = frameUm.height - (row + 0.5) * pixelPitchUm;
    if (yUm < box.bottom || yUm > box.top) continue;
    for (let column = firstColumn; column <= lastColumn; column += 1) {
      const place = placeOnAirfoil(airfoil, (column + 0.5) * pixelPitchUm, yUm);
      if (place.chord <= 0 || place.chord >= 1) continue;
      const at = row * envelope.width + column;
      const solidUm = solidThicknessUm(airfoil, place);
      if (place.span >= 0 && place.span <= 1) {
        envelope.values[at] = Math.max(envelope.values[at] ?? 0, filletedUm(airfoil, place.span, solidUm));
      }
      // A passage exists only in metal.
      if ((envelope.values[at] ?? 0) === 0) continue;
      for (const cavity of airfoil.cavities) {
        const depth = cavityDepthUm(airfoil, cavity, place, solidUm);
        if (depth > (open.values[at] ?? 0)) open.values[at] = depth;
      }
    }
  }
}

// Depth of a block near its edges, which casting and blending leave round.
function addBlock(block: BlockForm, pixelPitchUm: number, envelope: PixelGrid): void {
  const coverage = polygonCoverage(block.path, pixelPitchUm);
  const step = Math.max(1, Math.round(150 / pixelPitchUm));
  const soft = widelyBlurred(coverage, 320 / pixelPitchUm, step);
  for (let at = 0; at < envelope.values.length; at += 1) {
    const covered = coverage.values[at] ?? 0;
    if (covered === 0) continue;
    const inward = Math.min(1, Math.max(0.12, 2 * (soft.values[at] ?? 0) - 0.88));
    const depth = covered * block.depthUm * Math.sqrt(inward);
    if (depth > (envelope.values[at] ?? 0)) envelope.values[at] = depth;
  }
}

/** Projects a part along the beam: blocks and airfoils, less their passages. */
export function thicknessMap(form: PartForm, pixelPitchUm: number): ThicknessMap {
  const envelope = frameGrid(pixelPitchUm);
  const open = frameGrid(pixelPitchUm);
  for (const block of form.blocks) addBlock(block, pixelPitchUm, envelope);
  for (const airfoil of form.airfoils) addAirfoil(airfoil, pixelPitchUm, envelope, open);
  const metal = frameGrid(pixelPitchUm);
  for (let at = 0; at < metal.values.length; at += 1) {
    open.values[at] = Math.min(open.values[at] ?? 0, envelope.values[at] ?? 0);
    metal.values[at] = (envelope.values[at] ?? 0) - (open.values[at] ?? 0);
  }
  return { metal, open, envelope };
}
