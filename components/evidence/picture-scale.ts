import { decimalFrom } from '@/components/forms/decimal-text';
import { frameOf, type Registration } from '@/components/viewer/scale';
import { inFrame } from '@/components/viewer/drawing';
import type { MarkShape } from '@/components/viewer/marks';

/** What a link between a file and an inspection says about where and how large the picture lies on its view. */
export interface LinkRegistration extends Registration {
  readonly calibrated: boolean;
}

/** Reads a stored registration; null for none, and for one that is no registration. */
export function registrationIn(stored: unknown): LinkRegistration | null {
  if (typeof stored !== 'object' || stored === null) return null;
  const { pitchUm, originPx, turnDeg, calibrated } = stored as Record<string, unknown>;
  if (typeof pitchUm !== 'number' || !(pitchUm > 0) || !Number.isFinite(pitchUm)) return null;
  const isPoint = Array.isArray(originPx) && originPx.length === 2 && originPx.every((one) => typeof one === 'number');
  return {
    pitchUm,
    calibrated: calibrated === true,
    ...(isPoint ? { originPx: originPx as unknown as readonly [number, number] } : {}),
    ...(typeof turnDeg === 'number' ? { turnDeg } : {}),
  };
}

/** The pitch in micrometres for a typed width in millimetres of the area a picture shows; null for what is no width. */
export function pitchOfWidth(typedMm: string, widthPx: number): number | null {
  const exact = decimalFrom(typedMm);
  const mm = exact === undefined ? 0 : Number(exact);
  return mm > 0 && Number.isFinite(mm) ? (mm * 1000) / widthPx : null;
}

/** A mark that keeps its place in the picture while the picture's scale is corrected. */
export function rescaled(shape: MarkShape, heightPx: number, before: Registration, after: Registration): MarkShape {
  return inFrame(shape, frameOf(heightPx, before), frameOf(heightPx, after));
}
