import { type AirfoilForm, type CavityForm, type DemoView, frameUm, type PartForm, type PlaceUm } from './part-forms';

// The least thickness of a cast trailing edge.
const trailingEdgeUm = 900;

// Rows of pins follow the chord, so that a tapering airfoil cuts none in half.
const pinRowChord = 0.066;

/** Place as fractions on an airfoil: `chord` from leading (0) to trailing edge (1), `span` from start (0) to end (1). */
export interface AirfoilPlace {
  readonly chord: number;
  readonly span: number;
  readonly chordUm: number;
}

function through([start, middle, end]: readonly [number, number, number], span: number): number {
  return start * (1 - span) * (1 - 2 * span) + 4 * middle * span * (1 - span) + end * span * (2 * span - 1);
}

/** Across-span coordinates of both edges. Below the start of the span (inside a root) the passages draw together. */
function edgesUm(airfoil: AirfoilForm, span: number): readonly [leading: number, trailing: number] {
  const held = Math.min(1, Math.max(0, span));
  const leading = through(airfoil.leadingUm, held);
  const trailing = through(airfoil.trailingUm, held);
  if (span >= 0 || airfoil.closedAtEnd) return [leading, trailing];
  const middle = (leading + trailing) / 2;
  const kept = Math.max(0.35, 1 + 1.25 * span);
  return [middle + (leading - middle) * kept, middle + (trailing - middle) * kept];
}

/** Where a point of the view lies on an airfoil. */
export function placeOnAirfoil(airfoil: AirfoilForm, xUm: number, yUm: number): AirfoilPlace {
  const along = airfoil.spanAxis === 'x' ? xUm : yUm;
  const across = airfoil.spanAxis === 'x' ? yUm : xUm;
  const span = (along - airfoil.startUm) / (airfoil.endUm - airfoil.startUm);
  const [leading, trailing] = edgesUm(airfoil, span);
  return { span, chord: (across - leading) / (trailing - leading), chordUm: Math.abs(trailing - leading) };
}

/** The point of the view at fractions of span and chord, in whole micrometres. */
export function placeOnView(airfoil: AirfoilForm, span: number, chord: number): PlaceUm {
  const along = Math.round(airfoil.startUm + span * (airfoil.endUm - airfoil.startUm));
  const [leading, trailing] = edgesUm(airfoil, span);
  const across = Math.round(leading + chord * (trailing - leading));
  return airfoil.spanAxis === 'x' ? [along, across] : [across, along];
}

/** A line of constant chord fraction, from one span fraction to another. */
export function alongSpan(airfoil: AirfoilForm, chord: number, from = 0, to = 1, steps = 10): PlaceUm[] {
  return Array.from({ length: steps + 1 }, (_, step) => placeOnView(airfoil, from + ((to - from) * step) / steps, chord));
}

/** Metal between the outer surfaces, cavities not yet taken away, at a chord fraction (four-digit thickness law, NACA report 460, from memory). */
export function solidThicknessUm(airfoil: AirfoilForm, place: AirfoilPlace): number {
  const { chord, span } = place;
  if (chord <= 0 || chord >= 1) return 0;
  const law = 0.2969 * Math.sqrt(chord) - 0.126 * chord - 0.3516 * chord ** 2 + 0.2843 * chord ** 3 - 0.1036 * chord ** 4;
  const taper = airfoil.closedAtEnd ? 1 : 1 - 0.25 * Math.max(0, Math.min(1, span));
  // The round of the trailing edge keeps the last few hundredths of the chord from ending as a knife or a step.
  const round = Math.sqrt(Math.min(1, (1 - chord) / 0.012));
  return Math.max(5 * airfoil.thickestUm * taper * law, trailingEdgeUm) * round * Math.sqrt(Math.min(1, chord / 0.004));
}

// Pins stand in staggered rows; one whose middle would stand in a cavity's end is left out.
function pinAt(place: AirfoilPlace, cavity: CavityForm, spanLengthUm: number): boolean {
  if (cavity.pinsFrom === undefined || place.chord < cavity.pinsFrom) return false;
  const row = Math.floor((place.chord - cavity.pinsFrom) / pinRowChord);
  const rowChord = cavity.pinsFrom + (row + 0.5) * pinRowChord;
  if (rowChord > cavity.to - 0.4 * pinRowChord) return false;
  const acrossUm = (place.chord - rowChord) * place.chordUm;
  const shiftUm = row % 2 === 0 ? 0 : 1200;
  const alongUm = place.span * spanLengthUm;
  const pinUm = Math.round((alongUm - shiftUm) / 2400) * 2400 + shiftUm;
  if (pinUm < 1800 || pinUm > spanLengthUm - 3000) return false;
  return Math.hypot(acrossUm, alongUm - pinUm) < 480;
}

function ribDepthUm(place: AirfoilPlace, cavity: CavityForm, spanLengthUm: number): number {
  if (!cavity.ribbed) return 0;
  const slantedUm = place.span * spanLengthUm + 0.55 * (place.chord - cavity.from) * place.chordUm;
  const rib = Math.floor(slantedUm / 2600);
  // Whole ribs only: each is there or not by its own number.
  if (rib < 1 || (rib + 1) * 2600 > spanLengthUm) return 0;
  return slantedUm - rib * 2600 < 750 ? 420 : 0;
}

/** Open depth of one cavity along the beam where the airfoil is `solidUm` thick, 0 outside it. Its ends are rounded as a core's are. */
export function cavityDepthUm(airfoil: AirfoilForm, cavity: CavityForm, place: AirfoilPlace, solidUm: number): number {
  const { chord, span, chordUm } = place;
  if (chord <= cavity.from || chord >= cavity.to || span <= cavity.spanFrom || span >= cavity.spanTo) return 0;
  const full = solidUm - 2 * Math.min(cavity.wallUm, solidUm * 0.31);
  const spanLengthUm = airfoil.endUm - airfoil.startUm;
  const toEndUm = Math.min((chord - cavity.from) * chordUm, (cavity.to - chord) * chordUm);
  const toTipUm = Math.min((span - cavity.spanFrom) * spanLengthUm, (cavity.spanTo - span) * spanLengthUm);
  const radiusUm = Math.max(500, Math.min(full / 2, 1600));
  const rounded = (distanceUm: number): number =>
    distanceUm >= radiusUm ? 1 : Math.sqrt(Math.max(0, 1 - (1 - distanceUm / radiusUm) ** 2));
  const depth = full * rounded(toEndUm) * rounded(toTipUm);
  if (pinAt(place, cavity, spanLengthUm)) return 0;
  return Math.max(0, depth - ribDepthUm(place, cavity, spanLengthUm));
}

function mirrored(form: PartForm): PartForm {
  const flipsX = form.airfoils[0]?.spanAxis !== 'x';
  const across = flipsX ? frameUm.width : frameUm.height;
  const turn = ([x, y]: PlaceUm): PlaceUm => (flipsX ? [across - x, y] : [x, across - y]);
  const flip = ([a, b, c]: readonly [number, number, number]): readonly [number, number, number] => [
    across - a,
    across - b,
    across - c,
  ];
  return {
    ...form,
    // Reversed, so that a path still runs the same way round the part.
    blocks: form.blocks.map((block) => ({ ...block, path: block.path.map(turn).reverse() })),
    airfoils: form.airfoils.map((airfoil) => ({
      ...airfoil,
      leadingUm: flip(airfoil.leadingUm),
      trailingUm: flip(airfoil.trailingUm),
    })),
    indicatorAt: flipsX
      ? [across - form.indicatorAt[0], form.indicatorAt[1]]
      : [form.indicatorAt[0], across - form.indicatorAt[1]],
  };
}

/** The form as seen from one side: the convex side is the concave one mirrored across the span. */
export function formSeenFrom(form: PartForm, view: DemoView): PartForm {
  return view === 'concave' ? form : mirrored(form);
}
