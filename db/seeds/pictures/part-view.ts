import sharp from 'sharp';
import { letterStrokes } from './lead-letters';
import {
  type AirfoilForm,
  type DemoPartNumber,
  type DemoView,
  demoViews,
  frameUm,
  type PartForm,
  partForm,
  type PlaceUm,
} from './part-forms';
import { alongSpan, formSeenFrom } from './part-geometry';

/** A zone of a drawing on one view. Ids are unique over a part; the letter is what people call it: A root or platform, B airfoil, C trailing edge. */
export interface PartZone {
  readonly id: string;
  readonly letter: 'A' | 'B' | 'C';
  readonly view: DemoView;
  readonly polygon: readonly PlaceUm[];
}

/** Nominal view of a part: whole micrometres, y upwards, origin at the frame's lower left corner. */
export interface PartView {
  readonly view: DemoView;
  readonly title: string;
  readonly widthUm: number;
  readonly heightUm: number;
  readonly outline: readonly PlaceUm[];
  readonly zones: readonly PartZone[];
}

const trailingFrom = 0.8;

/** The edge with the smaller (or larger) coordinate across the span, start to end. */
function sideOf(airfoil: AirfoilForm, which: 'low' | 'high'): PlaceUm[] {
  const leadingIsLow = airfoil.leadingUm[0] < airfoil.trailingUm[0];
  return alongSpan(airfoil, leadingIsLow === (which === 'low') ? 0 : 1);
}

function outlineOf(form: PartForm): PlaceUm[] {
  const ordered = [...form.airfoils].sort((one, other) => one.leadingUm[0] - other.leadingUm[0]);
  const [first, last] = [ordered[0], ordered.at(-1)];
  if (first === undefined || last === undefined) return [];
  const [start, end] = form.blocks;
  const low = sideOf(first, 'low');
  const high = sideOf(last, 'high');
  // Round a blade: root from its upper to its lower side, out along the lower edge, back along the upper one.
  if (end === undefined) return [...(start?.path ?? []), ...low, ...high.reverse()];
  return [...end.path, ...low.reverse(), ...(start?.path ?? []), ...high];
}

function band(airfoil: AirfoilForm, from: number, to: number): PlaceUm[] {
  return [...alongSpan(airfoil, from), ...alongSpan(airfoil, to).reverse()];
}

function zonesOf(form: PartForm, view: DemoView): PartZone[] {
  const suffix = view === 'concave' ? '' : '-convex';
  const numbered = (letter: string, place: number): string =>
    `${letter}${form.airfoils.length > 1 ? String(place + 1) : ''}${suffix}`;
  return [
    ...form.blocks.map((block): PartZone => ({ id: `${block.zone}${suffix}`, letter: 'A', view, polygon: block.path })),
    ...form.airfoils.flatMap((airfoil, place): PartZone[] => [
      { id: numbered('B', place), letter: 'B', view, polygon: band(airfoil, 0, trailingFrom) },
      { id: numbered('C', place), letter: 'C', view, polygon: band(airfoil, trailingFrom, 1) },
    ]),
  ];
}

function viewOf(partNumber: DemoPartNumber, view: DemoView): PartView {
  const form = formSeenFrom(partForm(partNumber), view);
  const title = `${form.title}, seen from the ${view} side`;
  return { view, title, widthUm: frameUm.width, heightUm: frameUm.height, outline: outlineOf(form), zones: zonesOf(form, view) };
}

function viewsOf(partNumber: DemoPartNumber): readonly PartView[] {
  return demoViews.map((view) => viewOf(partNumber, view));
}

/** The nominal views of each demo part, with outline and zones for its plans. */
export const partViews: Readonly<Record<DemoPartNumber, readonly PartView[]>> = {
  'AM-2210': viewsOf('AM-2210'),
  'AM-3175': viewsOf('AM-3175'),
  'AM-4402': viewsOf('AM-4402'),
};

function pathOf(places: readonly PlaceUm[], closed = true): string {
  const points = places.map(([x, y]) => `${String(x)} ${String(frameUm.height - y)}`).join(' L ');
  return `M ${points}${closed ? ' Z' : ''}`;
}

function lettersPath(text: string, at: PlaceUm, cellUm: number): string {
  return letterStrokes(text, at, cellUm)
    .map((stroke) => pathOf(stroke, false))
    .join(' ');
}

/** Middle of a zone; of a block the middle of its airfoil side and a little into it, since its box's middle may lie outside it. */
function labelPlace(zone: PartZone, form: PartForm): PlaceUm {
  const block = form.blocks.find((one) => zone.id.replace('-convex', '') === one.zone);
  if (block === undefined) {
    const xs = zone.polygon.map(([x]) => x);
    const ys = zone.polygon.map(([, y]) => y);
    return [(Math.min(...xs) + Math.max(...xs)) / 2, (Math.min(...ys) + Math.max(...ys)) / 2];
  }
  const [first, last] = [block.path[0] ?? [0, 0], block.path.at(-1) ?? [0, 0]];
  const turned = first[0] === last[0];
  const side: PlaceUm = [(first[0] + last[0]) / 2, (first[1] + last[1]) / 2];
  if (turned) return [side[0] - 7_000, side[1]];
  return [side[0], side[1] + (side[1] > frameUm.height / 2 ? 1_600 : -1_600)];
}

function labelPath(zone: PartZone, form: PartForm): string {
  const [x, y] = labelPlace(zone, form);
  const text = zone.id.replace('-convex', '');
  const cellUm = 240;
  return lettersPath(text, [Math.round(x - (6.4 * text.length - 2.4) * (cellUm / 2)), Math.round(y - 3 * cellUm)], cellUm);
}

function cavityPaths(airfoil: AirfoilForm): string {
  return airfoil.cavities
    .map((cavity) => {
      const [from, to] = [Math.max(0, cavity.spanFrom), Math.min(1, cavity.spanTo)];
      return pathOf([...alongSpan(airfoil, cavity.from, from, to), ...alongSpan(airfoil, cavity.to, from, to).reverse()]);
    })
    .join(' ');
}

/** Lines along the airfoil that show which way its surface curves: close together towards the leading edge on the convex side. */
function contourPaths(airfoil: AirfoilForm, view: DemoView): string {
  const chords = view === 'convex' ? [0.03, 0.08, 0.16, 0.28] : [0.03, 0.12, 0.3, 0.55];
  return chords.map((chord) => pathOf(alongSpan(airfoil, chord, 0.03, 0.97), false)).join(' ');
}

function drawingOf(partNumber: DemoPartNumber, view: PartView): string {
  const form = formSeenFrom(partForm(partNumber), view.view);
  const labels = view.zones.map((zone) => labelPath(zone, form));
  const divisions = form.airfoils.map((airfoil) => pathOf(alongSpan(airfoil, trailingFrom), false));
  const bodies = [
    ...form.airfoils.map((airfoil) => pathOf(band(airfoil, 0, 1))),
    ...form.blocks.map((block) => pathOf(block.path)),
  ];
  const scaleBar = pathOf(
    [
      [50_000, 2_600],
      [50_000, 2_000],
      [60_000, 2_000],
      [60_000, 2_600],
    ],
    false,
  );
  return `<svg xmlns="http://www.w3.org/2000/svg" width="1400" height="1000" viewBox="0 0 ${String(frameUm.width)} ${String(frameUm.height)}">
<rect width="100%" height="100%" fill="#ffffff"/>
<g fill="none" stroke="#1a1e21" stroke-linejoin="round" stroke-linecap="round">
<path d="${bodies.join(' ')}" fill="#f5f4ef" stroke="none"/>
<path d="${form.airfoils.map((airfoil) => contourPaths(airfoil, view.view)).join(' ')}" stroke="#aab0b4" stroke-width="70"/>
<path d="${form.airfoils.map(cavityPaths).join(' ')}" stroke="#5c656b" stroke-width="110" stroke-dasharray="700 450"/>
<path d="${divisions.join(' ')}" stroke-width="110" stroke-dasharray="1500 400 200 400"/>
<path d="${bodies.join(' ')}" stroke-width="240"/>
<path d="${labels.join(' ')}" stroke="#f5f4ef" stroke-width="600"/>
<path d="${labels.join(' ')}" stroke-width="170"/>
<path d="${scaleBar} ${lettersPath('10 MM', [61_000, 1_500], 200)}" stroke-width="140"/>
<path d="${lettersPath(`${partNumber} ${view.view}`, [3_000, 1_500], 260)}" stroke-width="150"/>
</g></svg>`;
}

/**
 * Line drawing of a view as PNG, 1400 × 1000 pixels (50 µm each): outline firm, passages dashed, zones divided by chain lines.
 * Letters are strokes, not a font, so that no installed font changes the bytes.
 * @throws RangeError when the part has no such view.
 */
export function partViewPng(partNumber: DemoPartNumber, view: DemoView): Promise<Buffer> {
  const found = partViews[partNumber].find((one) => one.view === view);
  if (found === undefined) throw new RangeError(`${partNumber} has no view '${view}'`);
  const drawing = Buffer.from(drawingOf(partNumber, found));
  return sharp(drawing).png({ compressionLevel: 9 }).toBuffer();
}

/** Every zone of a part in the form that a plan's criteria take. */
export function criteriaZones(partNumber: DemoPartNumber): { id: string; view: string; polygon: PlaceUm[] }[] {
  return partViews[partNumber].flatMap((view) =>
    view.zones.map(({ id, polygon }) => ({ id, view: view.view, polygon: [...polygon] })),
  );
}
