import type { PointUm } from '../evaluate/types';
import {
  fault,
  filledText,
  isObject,
  joinPath,
  listOf,
  objectOf,
  optional,
  required,
  textAt,
  truth,
  whole,
  anyText,
  type Check,
} from '../form/check';
import { distinctPoints } from './outline';
import { bordersMeet } from './simple-polygon';

const place: Check = (value, path, faults) => {
  const good =
    Array.isArray(value) && value.length === 2 && value.every((one) => Number.isInteger(one) && Math.abs(one as number) <= 1e8);
  return good ? true : fault(faults, path, 'must be two whole numbers of micrometres');
};

const size = whole(1, 1e8);

const axes: Check = (value, path, faults) => {
  if (!Array.isArray(value) || value.length !== 2) return fault(faults, path, 'must be two full axes in whole micrometres');
  return listOf(size)(value, path, faults);
};

const angle: Check = (value, path, faults) =>
  typeof value === 'number' && Number.isFinite(value) ? true : fault(faults, path, 'must be a finite number of degrees');

function pointsOf(least: number, closed: boolean): Check {
  return (value, path, faults) => {
    if (!listOf(place)(value, path, faults)) return false;
    const distinct = distinctPoints(value as PointUm[], closed);
    if (new Set(distinct.map(String)).size < least)
      return fault(faults, path, `must have at least ${String(least)} different points`);
    return closed && bordersMeet(distinct) ? fault(faults, path, 'must not cross or touch itself') : true;
  };
}

const forms: Readonly<Record<string, Check>> = {
  circle: objectOf({ kind: required(anyText), center: required(place), diameter: required(size) }),
  ellipse: objectOf({ kind: required(anyText), center: required(place), axes: required(axes), angle: optional(angle) }),
  polyline: objectOf({ kind: required(anyText), points: required(pointsOf(2, false)), width: required(size) }),
  polygon: objectOf({ kind: required(anyText), points: required(pointsOf(3, true)) }),
  entered: objectOf({
    kind: required(anyText),
    length: required(size),
    width: required(size),
    zone: required(filledText),
    basis: required(filledText),
    apart: optional(truth),
  }),
};

/** A shape as drawn or entered; every fault of its form. */
export const shapeForm: Check = (value, path, faults) => {
  if (!isObject(value)) return fault(faults, path, 'must be an object, or null in words');
  const kind = textAt(value, 'kind') ?? '';
  const form = Object.hasOwn(forms, kind) ? forms[kind] : undefined;
  if (!form) return fault(faults, joinPath(path, 'kind'), `must be one of ${Object.keys(forms).join(', ')}`);
  if (!form(value, path, faults)) return false;
  const { length, width } = value as { length?: unknown; width?: unknown };
  if (kind === 'entered' && typeof length === 'number' && typeof width === 'number' && length < width) {
    return fault(faults, joinPath(path, 'length'), 'must not be less than the width');
  }
  return true;
};
