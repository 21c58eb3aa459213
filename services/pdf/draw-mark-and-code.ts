import { qrcode } from 'bwip-js/node';
import type { PDFPage } from 'pdf-lib';
import { inks } from './paper';

/** A code whose text does not fit or is not accepted by the writer. */
export class CodeError extends Error {
  constructor(fault: string) {
    super(fault);
    this.name = 'CodeError';
  }
}

/** Where the ring's gap was, degrees clockwise from twelve, and the hairline that still shows at each of its ends. */
const gap = { from: 28, to: 68, seam: 4 };

/** The mark: a ring with one short gap that has just closed. `xPt`, `yPt` is its centre. */
export function drawMark(page: PDFPage, xPt: number, yPt: number, radiusPt: number): void {
  const stroke = radiusPt * 0.36;
  const middle = radiusPt - stroke / 2;
  const draw = (from: number, to: number, color: typeof inks.ink) =>
    page.drawSvgPath(arc(middle, from, to), { x: xPt, y: yPt, borderColor: color, borderWidth: stroke });
  draw(gap.to, 360 + gap.from, inks.ink);
  draw(gap.from + gap.seam, gap.to - gap.seam, inks.accent);
}

function arc(radius: number, fromDegrees: number, toDegrees: number): string {
  const point = (degrees: number) => {
    const turn = (degrees * Math.PI) / 180;
    return `${(radius * Math.sin(turn)).toFixed(3)} ${(-radius * Math.cos(turn)).toFixed(3)}`;
  };
  const large = toDegrees - fromDegrees > 180 ? 1 : 0;
  return `M ${point(fromDegrees)} A ${radius.toFixed(3)} ${radius.toFixed(3)} 0 ${large} 1 ${point(toDegrees)}`;
}

/**
 * A QR code (ISO/IEC 18004, level M) as one vector path on an opaque white ground with its quiet zone of four modules.
 * `xPt`, `yPt` is the lower left corner of the ground, `sidePt` its side. Throws CodeError.
 */
export function drawQrCode(page: PDFPage, text: string, xPt: number, yPt: number, sidePt: number): void {
  const { path, modules } = qrOutline(text);
  const quiet = 4;
  const scale = sidePt / (modules + 2 * quiet);
  page.drawRectangle({ x: xPt, y: yPt, width: sidePt, height: sidePt, color: inks.ground });
  page.drawSvgPath(path, { x: xPt + quiet * scale, y: yPt + sidePt - quiet * scale, scale, color: inks.ink });
}

/** The outline of the dark modules, one unit each; holes run the other way round, so that any fill rule paints them right. */
function qrOutline(text: string): { path: string; modules: number } {
  let path = '';
  let modules = 0;
  const nothing = () => undefined;
  // A constant, because the writer's types do not know the options of single symbologies.
  const options = { bcid: 'qrcode', text, eclevel: 'M', scale: 1, padding: 0 };
  qrcode(options, {
    scale: () => [1, 1],
    measure: () => ({ width: 0, ascent: 0, descent: 0 }),
    init: (width: number) => {
      modules = width;
    },
    polygon: (points: [number, number][]) => {
      path += `M${points.map(([x, y]) => `${x} ${y}`).join('L')}z`;
    },
    line: nothing,
    hexagon: nothing,
    ellipse: nothing,
    fill: nothing,
    text: nothing,
    end: nothing,
  });
  if (modules === 0 || path === '') throw new CodeError(`No QR code can hold "${text.slice(0, 80)}"`);
  return { path, modules };
}
