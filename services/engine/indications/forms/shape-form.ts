import type { Fault } from '../../evaluate/fault';
import type { PointUm, Shape } from '../../evaluate/types';
import { fault, filledText, joinPath, listOf, objectOf, oneOf, optional, required, textAt, truth, whole } from '../../form/check';
import type { Check, Field } from '../../form/check';
import { differentPoints, withoutRepeats } from '../geometry/points';
import { isSimple } from '../geometry/polygon';

/** Marks are whole micrometres of at most this magnitude (N6). */
const LARGEST_UM = 100_000_000;

const coordinate = whole(-LARGEST_UM, LARGEST_UM);
const size = whole(1, LARGEST_UM);

const pairOf =
  (check: Check): Check =>
  (value, path, faults) => {
    if (!Array.isArray(value) || value.length !== 2) return fault(faults, path, 'must be a list of two numbers');
    return listOf(check)(value, path, faults);
  };

const point = pairOf(coordinate);

const finiteNumber: Check = (value, path, faults) =>
  typeof value === 'number' && Number.isFinite(value) ? true : fault(faults, path, 'must be a finite number');

/** Points of a filled outline: at least three different ones, no two edges meeting except neighbours at their corner. */
export const simplePolygon: Check = (value, path, faults) => {
  if (!listOf(point)(value, path, faults)) return false;
  const points = withoutRepeats(value as readonly PointUm[], true);
  if (differentPoints(points) < 3) return fault(faults, path, 'must have at least three different points');
  return isSimple(points) ? true : fault(faults, path, 'must not cross or touch itself');
};

const line: Check = (value, path, faults) => {
  if (!listOf(point)(value, path, faults)) return false;
  return differentPoints(value as readonly PointUm[]) < 2 ? fault(faults, path, 'must have at least two different points') : true;
};

const kind = required(oneOf('circle', 'ellipse', 'polyline', 'polygon', 'entered'));

const fieldsOf: Readonly<Record<Shape['kind'], Readonly<Record<string, Field>>>> = {
  circle: { kind, center: required(point), diameter: required(size) },
  ellipse: { kind, center: required(point), axes: required(pairOf(size)), angle: optional(finiteNumber) },
  polyline: { kind, points: required(line), width: required(size) },
  polygon: { kind, points: required(simplePolygon) },
  entered: {
    kind,
    length: required(size),
    width: required(size),
    zone: required(filledText),
    basis: required(filledText),
    apart: optional(truth),
  },
};

function notWider(value: unknown, path: string, faults: Fault[]): boolean {
  const { length, width } = value as Extract<Shape, { readonly kind: 'entered' }>;
  return width <= length ? true : fault(faults, joinPath(path, 'width'), 'must not be above the length');
}

/** An outline, or sizes entered without a picture. */
export const shapeForm: Check = (value, path, faults) => {
  const name = textAt(value, 'kind');
  if (name === undefined || !Object.hasOwn(fieldsOf, name)) return kindFault(value, path, faults);
  if (!objectOf(fieldsOf[name as Shape['kind']])(value, path, faults)) return false;
  return name === 'entered' ? notWider(value, path, faults) : true;
};

function kindFault(value: unknown, path: string, faults: Fault[]): boolean {
  const anything = optional(() => true);
  const keys = Object.values(fieldsOf).flatMap((fields) => Object.keys(fields));
  return objectOf({ ...Object.fromEntries(keys.map((key) => [key, anything])), kind })(value, path, faults);
}
