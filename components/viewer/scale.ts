/** A place in the picture: pixels from the upper left corner, x to the right, y down. The centre of the first pixel is (0.5, 0.5). */
export type PicturePoint = readonly [number, number];
/** A place on the named view: whole micrometres, x to the right, y upwards, as the acceptance engine takes it. */
export type ViewPoint = readonly [number, number];

/** How a picture lies on its view: pitch in micrometres per pixel, where the view's origin is in the picture, turn anticlockwise. */
export interface Frame {
  readonly pitchUm: number;
  readonly originPx: PicturePoint;
  readonly turnDeg: number;
}

/** What a stored registration says. Without an origin the view begins at the lower left corner of the picture. */
export interface Registration {
  readonly pitchUm: number;
  readonly originPx?: PicturePoint;
  readonly turnDeg?: number;
}

/** Units per pixel in which marks are kept on a picture whose scale nobody knows: thousandths of a pixel. */
export const unitsPerPixelUnscaled = 1000;

/** The frame of a picture. Throws RangeError for a pitch that is not a positive number. */
export function frameOf(heightPx: number, registration: Registration): Frame {
  const { pitchUm, originPx = [0, heightPx], turnDeg = 0 } = registration;
  if (!(pitchUm > 0 && Number.isFinite(pitchUm)))
    throw new RangeError('The pixel pitch must be a positive number of micrometres.');
  return { pitchUm, originPx, turnDeg };
}

/** The frame of a picture without a scale. */
export function unscaledFrame(heightPx: number): Frame {
  return frameOf(heightPx, { pitchUm: unitsPerPixelUnscaled });
}

/** Picture to view, rounded to whole micrometres. */
export function toView(frame: Frame, [x, y]: PicturePoint): ViewPoint {
  const [dx, dy] = [(x - frame.originPx[0]) * frame.pitchUm, (frame.originPx[1] - y) * frame.pitchUm];
  const [cosine, sine] = turn(frame.turnDeg);
  return [whole(dx * cosine - dy * sine), whole(dx * sine + dy * cosine)];
}

/** View to picture, in fractions of a pixel. */
export function toPicture(frame: Frame, [x, y]: ViewPoint): PicturePoint {
  const [cosine, sine] = turn(frame.turnDeg);
  const [dx, dy] = [x * cosine + y * sine, y * cosine - x * sine];
  return [frame.originPx[0] + dx / frame.pitchUm, frame.originPx[1] - dy / frame.pitchUm];
}

/** A length in the picture as whole micrometres, never less than one. */
export function lengthUm(frame: Frame, lengthPx: number): number {
  return Math.max(1, whole(lengthPx * frame.pitchUm));
}

/** The pitch of a picture of which a person says how many millimetres lie across its width. */
export function pitchFromWidth(widthPx: number, acrossMm: number): number {
  return (acrossMm * 1000) / widthPx;
}

// Adding zero turns -0 into 0: the engine's canonical form knows only one zero.
function whole(value: number): number {
  return Math.round(value) + 0;
}

function turn(degrees: number): readonly [number, number] {
  const radians = (degrees * Math.PI) / 180;
  return [Math.cos(radians), Math.sin(radians)];
}
