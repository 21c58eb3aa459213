import type { DemoView } from './part-forms';
import { checkShape, type KnownFlaw, type MarkShape, type RadiographicFlaw, shrinkageVoids, withinEllipse } from './known-flaws';
import { randomFrom } from './seeded-random';
import { boxAround, fromSegment, paintMean } from './shape-raster';
import type { ThicknessMap } from './thickness-map';

// Attenuation against the alloy's: ceramic shell or slag, tungsten-rich or tantalum-rich metal, ceramic core.
const relativeDensity = { lighter: 0.25, denser: 2.1, core: 0.3 } as const;

type Add = (at: number, depthUm: number) => void;

function paintSphere(shape: Extract<MarkShape, { kind: 'circle' }>, map: ThicknessMap, pitchUm: number, add: Add): void {
  const radius = shape.diameter / 2;
  const chord = (x: number, y: number): number =>
    2 * Math.sqrt(Math.max(0, radius ** 2 - (x - shape.center[0]) ** 2 - (y - shape.center[1]) ** 2));
  paintMean(map.metal, pitchUm, boxAround([shape.center], radius), 5, chord, add);
}

function paintEllipse(shape: Extract<MarkShape, { kind: 'ellipse' }>, map: ThicknessMap, pitchUm: number, add: Add): void {
  // An ellipsoid as deep as it is wide.
  const depth = (x: number, y: number): number => {
    const [along, across] = withinEllipse(x, y, shape.center, shape.axes, shape.angle);
    return shape.axes[1] * Math.sqrt(Math.max(0, 1 - along ** 2 - across ** 2));
  };
  paintMean(map.metal, pitchUm, boxAround([shape.center], Math.max(...shape.axes) / 2), 4, depth, add);
}

/** A flat gap of the stated width, deepest in the middle of its length and running out at both ends. */
function paintGap(
  shape: Extract<MarkShape, { kind: 'polyline' }>,
  deepestUm: number,
  map: ThicknessMap,
  pitchUm: number,
  add: Add,
): void {
  const pieces = shape.points.slice(1).map((to, at) => {
    const from = shape.points[at] ?? to;
    return { from, to, length: Math.hypot(to[0] - from[0], to[1] - from[1]) };
  });
  const whole = pieces.reduce((sum, piece) => sum + piece.length, 0);
  const depth = (x: number, y: number): number => {
    let deepest = 0;
    let before = 0;
    for (const piece of pieces) {
      const { distance, along } = fromSegment(x, y, piece.from, piece.to);
      if (distance <= shape.width / 2) {
        const place = (before + along * piece.length) / whole;
        deepest = Math.max(deepest, deepestUm * Math.sqrt(Math.max(0, 1 - (2 * place - 1) ** 4)));
      }
      before += piece.length;
    }
    return deepest;
  };
  paintMean(map.metal, pitchUm, boxAround(shape.points, shape.width), 4, depth, add);
}

function markOf(flaw: RadiographicFlaw): MarkShape {
  if (flaw.type === 'gas-pore') return { kind: 'circle', center: flaw.center, diameter: flaw.diameterUm };
  if (flaw.type === 'crack') return { kind: 'polyline', points: flaw.points, width: flaw.widthUm };
  return { kind: 'ellipse', center: flaw.center, axes: flaw.axesUm, angle: flaw.angle };
}

/** Changes the metal of a thickness map by one flaw and answers the truth about it. No void is deeper than the metal it lies in. */
export function addFlaw(map: ThicknessMap, flaw: RadiographicFlaw, view: DemoView, pitchUm: number, seed: number): KnownFlaw {
  const shape = checkShape(markOf(flaw));
  const values = map.metal.values;
  const add: (factor: number) => Add = (factor) => (at, depthUm) => {
    const metal = values[at] ?? 0;
    values[at] = metal + factor * Math.min(depthUm, metal);
  };
  if (flaw.type === 'shrinkage') {
    const members = shrinkageVoids(flaw, randomFrom(seed));
    for (const member of members) if (member.kind === 'circle') paintSphere(member, map, pitchUm, add(-1));
    return { type: flaw.type, view, shape, members };
  }
  if (flaw.type === 'residual-core' && shape.kind === 'ellipse') {
    const left = (x: number, y: number): number => {
      const [along, across] = withinEllipse(x, y, shape.center, shape.axes, shape.angle);
      return Math.min(1, Math.max(0, 4 * (1 - Math.hypot(along, across))));
    };
    paintMean(map.metal, pitchUm, boxAround([shape.center], Math.max(...shape.axes) / 2), 2, left, (at, share) => {
      values[at] = (values[at] ?? 0) + relativeDensity.core * share * (map.open.values[at] ?? 0);
    });
  } else if (shape.kind === 'circle') {
    paintSphere(shape, map, pitchUm, add(-1));
  } else if (shape.kind === 'polyline' && flaw.type === 'crack') {
    paintGap(shape, flaw.depthUm, map, pitchUm, add(-1));
  } else if (shape.kind === 'ellipse' && flaw.type === 'inclusion') {
    paintEllipse(shape, map, pitchUm, add(relativeDensity[flaw.density] - 1));
  }
  return { type: flaw.type, view, shape };
}
