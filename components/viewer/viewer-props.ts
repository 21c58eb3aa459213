import type { PaletteName } from '@/components/theme/palettes';
import type { Mark, MarkVerdict } from './marks';
import type { Registration, ViewPoint } from './scale';

/** 16-bit pixels as packed at admission, or a picture a browser shows by itself. Sizes in pixels. */
export interface ViewerSource {
  readonly kind: 'packed16' | 'picture';
  readonly url: string;
  readonly width: number;
  readonly height: number;
  /** Calibrated micrometres per pixel; absent or null where nobody measured it. */
  readonly pixelPitchUm?: number | null;
}

/** A zone of the plan on this view, outline in micrometres. */
export interface ViewerZone {
  readonly id: string;
  readonly polygon: readonly ViewPoint[];
}

export interface ViewerProps {
  readonly source: ViewerSource;
  /** Name of the nominal view the picture shows. */
  readonly view: string;
  readonly zones?: readonly ViewerZone[];
  readonly marks: readonly Mark[];
  readonly onMarksChange?: (marks: readonly Mark[]) => void;
  readonly readOnly?: boolean;
  /** In the booth a picture is not inverted: a bright field would be a lamp. */
  readonly palette?: PaletteName;
  /** Where the view's origin lies in the picture, and its pitch where the source has none. */
  readonly registration?: Registration | null;
  /** True when the registration was measured; otherwise its scale, like one entered here, is indicative. */
  readonly registrationCalibrated?: boolean;
  /** A person said how wide the picture is: micrometres per pixel, indicative. Keep it, and hand it back as `registration`. */
  readonly onScaleEntered?: (pitchUm: number) => void;
  /** The engine's answer for each mark, by id. */
  readonly verdicts?: Readonly<Record<string, MarkVerdict>>;
  readonly selectedId?: string | null;
  readonly onSelect?: (id: string | null) => void;
  /** Ids used elsewhere in the inspection; a new mark takes the next free number. */
  readonly takenIds?: readonly string[];
}
