/** The states a requirement can be in, in the words of the route. */
export const requirementStates = [
  'open',
  'in-work',
  'met',
  'met-by-sample',
  'met-by-ancestor',
  'met-by-outside-certificate',
  'waived',
  'rejected',
  'awaiting-decision',
  'to-be-repeated',
] as const;
export type RequirementState = (typeof requirementStates)[number];

export interface RingSegment {
  key: string;
  title: string;
  state: RequirementState;
  href?: string;
  /** Segments of one stage are drawn as one when a small ring would have too many. */
  stage?: string;
}

/** How a segment is drawn. Never a colour: each form can be told from the others in one tone. */
export type SegmentForm = 'full' | 'half' | 'thin' | 'detached' | 'notched' | 'ticked';

export interface RingShape {
  /** SVG path data in a box of 100 × 100 whose middle is 50, 50. */
  path: string;
  form: SegmentForm;
  /** The middle of the segment, in degrees clockwise from twelve. */
  middleDeg: number;
}

export interface RingProfile {
  /** Radius of the outer edge of a full-width segment; the box is 100 wide. */
  outer: number;
  band: number;
  half: number;
  thin: number;
  /** Length of the gap between neighbours, along the middle of the band. */
  gap: number;
  /** How far a detached segment moves outward. */
  lift: number;
}

export const largeProfile: RingProfile = { outer: 43, band: 13, half: 6.5, thin: 1.6, gap: 2.2, lift: 5.5 };
export const smallProfile: RingProfile = { outer: 43, band: 24, half: 12, thin: 4.5, gap: 4, lift: 7 };

/** More than this many segments cannot be told apart in a ring of 20 to 28 px. */
export const mostSmallSegments = 14;

const forms: Record<RequirementState, SegmentForm> = {
  open: 'thin',
  'in-work': 'half',
  met: 'full',
  'met-by-sample': 'full',
  'met-by-ancestor': 'full',
  'met-by-outside-certificate': 'full',
  waived: 'full',
  rejected: 'notched',
  'awaiting-decision': 'detached',
  'to-be-repeated': 'ticked',
};

export function isAccepted(state: RequirementState): boolean {
  return forms[state] === 'full';
}

export function formOf(state: RequirementState): SegmentForm {
  return forms[state];
}

/** A ring is closed when it has segments and each is accepted: then nothing on the route stands in the way. */
export function isClosed(segments: readonly { state: RequirementState }[]): boolean {
  return segments.length > 0 && segments.every(({ state }) => isAccepted(state));
}

function at(radius: number, deg: number): string {
  const turn = ((deg - 90) * Math.PI) / 180;
  return `${round(50 + radius * Math.cos(turn))} ${round(50 + radius * Math.sin(turn))}`;
}

function round(value: number): number {
  return Math.round(value * 100) / 100 + 0;
}

function arc(radius: number, toDeg: number, spanDeg: number, clockwise: boolean): string {
  return `A${round(radius)} ${round(radius)} 0 ${spanDeg > 180 ? 1 : 0} ${clockwise ? 1 : 0} ${at(radius, toDeg)}`;
}

/** From one angle to another; past half a turn in two strokes, since ends that meet would draw nothing at all. */
function sweep(radius: number, fromDeg: number, toDeg: number): string {
  const spanDeg = Math.abs(toDeg - fromDeg);
  const clockwise = toDeg > fromDeg;
  if (spanDeg < 180) return arc(radius, toDeg, spanDeg, clockwise);
  return arc(radius, (fromDeg + toDeg) / 2, spanDeg / 2, clockwise) + arc(radius, toDeg, spanDeg / 2, clockwise);
}

function band(inner: number, outer: number, fromDeg: number, toDeg: number): string {
  return `M${at(outer, fromDeg)}${sweep(outer, fromDeg, toDeg)}L${at(inner, toDeg)}${sweep(inner, toDeg, fromDeg)}Z`;
}

/** A V cut from the outer edge towards the middle of the band, as a file would leave it. */
function notched(inner: number, outer: number, fromDeg: number, toDeg: number): string {
  const span = toDeg - fromDeg;
  const middle = (fromDeg + toDeg) / 2;
  const depth = outer - (outer - inner) * 0.66;
  const mouth = Math.min(span * 0.44, ((outer - inner) / outer) * (180 / Math.PI) * 0.95) / 2;
  return (
    `M${at(outer, fromDeg)}${sweep(outer, fromDeg, middle - mouth)}L${at(depth, middle)}L${at(outer, middle + mouth)}` +
    `${sweep(outer, middle + mouth, toDeg)}L${at(inner, toDeg)}${sweep(inner, toDeg, fromDeg)}Z`
  );
}

/** A thin segment with a short stroke inward at its end: go back and do it again. */
function ticked(centre: number, profile: RingProfile, fromDeg: number, toDeg: number): string {
  const { thin } = profile;
  const stroke = Math.min((thin / centre) * (180 / Math.PI), (toDeg - fromDeg) / 2);
  const inner = centre - profile.band / 2;
  return `${band(centre - thin / 2, centre + thin / 2, fromDeg, toDeg)}${band(inner, centre, toDeg - stroke, toDeg)}`;
}

function segmentPath(form: SegmentForm, profile: RingProfile, fromDeg: number, toDeg: number): string {
  const { outer, lift } = profile;
  const inner = outer - profile.band;
  const centre = (outer + inner) / 2;
  const widths = { full: profile.band, half: profile.half, thin: profile.thin };
  if (form === 'notched') return notched(inner, outer, fromDeg, toDeg);
  if (form === 'ticked') return ticked(centre, profile, fromDeg, toDeg);
  if (form === 'detached') return band(inner + lift + profile.band * 0.18, outer + lift, fromDeg, toDeg);
  return band(centre - widths[form] / 2, centre + widths[form] / 2, fromDeg, toDeg);
}

/** The unbroken circle of a closed ring, as two half bands that meet. */
export function closedPath({ outer, band: width }: RingProfile): string {
  const circle = (radius: number, clockwise: boolean) =>
    `M${at(radius, 0)}${arc(radius, 180, 180, clockwise)}${arc(radius, 360, 180, clockwise)}Z`;
  return circle(outer, true) + circle(outer - width, false);
}

/** One shape for each part of the route, clockwise from twelve; a part takes angle by its weight (1 unless told). */
export function ringShapes(
  parts: readonly { state: RequirementState; weight?: number }[],
  profile: RingProfile = largeProfile,
): RingShape[] {
  const total = parts.reduce((sum, { weight = 1 }) => sum + weight, 0);
  if (total === 0) return [];
  const centre = profile.outer - profile.band / 2;
  const least = (360 / total) * Math.min(...parts.map(({ weight = 1 }) => weight));
  const gapDeg = parts.length === 1 ? 0.01 : Math.min((profile.gap / centre) * (180 / Math.PI), least * 0.4);
  let turned = 0;
  return parts.map(({ state, weight = 1 }) => {
    const fromDeg = (turned / total) * 360 + gapDeg / 2;
    turned += weight;
    const toDeg = (turned / total) * 360 - gapDeg / 2;
    const form = formOf(state);
    return { form, middleDeg: (fromDeg + toDeg) / 2, path: segmentPath(form, profile, fromDeg, toDeg) };
  });
}

/** Where the label of a segment stands: a point on a circle around the ring, in the box of 100. */
export function labelPoint(middleDeg: number, radius: number): { x: number; y: number } {
  const turn = ((middleDeg - 90) * Math.PI) / 180;
  return { x: round(50 + radius * Math.cos(turn)), y: round(50 + radius * Math.sin(turn)) };
}
