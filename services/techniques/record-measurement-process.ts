import { keepMeasurementProcess, techniquesAfter } from '@/db/repositories/techniques';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { MeasurementProcess, recordMeasurementProcess as contract } from '@/services/contracts/techniques';
import { compare, rationalOf, ZERO } from '@/services/engine/quantity/decimal';
import { unitOf } from '@/services/engine/quantity/units';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';

/**
 * Records the expanded uncertainty of a measurement process from a day on. Problems: invalid-input, already-exists for
 * the same technique, characteristic, kind of gauge and day.
 */
export async function recordMeasurementProcess(
  work: Work & { readonly actor: Actor },
  body: BodyOf<typeof contract>,
): Promise<Recorded<MeasurementProcess>> {
  const [known] = await techniquesAfter(work, { number: body.technique }, 1, null);
  const positive = (text: string) => compare(rationalOf(text), ZERO) > 0;
  const errors: FieldError[] = [
    ...(known ? [] : [{ path: 'technique', message: 'is not a technique of this plant' }]),
    ...(positive(body.expanded) ? [] : [{ path: 'expanded', message: 'must be above zero' }]),
    ...(positive(body.k) ? [] : [{ path: 'k', message: 'must be above zero' }]),
    ...(unitOf(body.unit) ? [] : [{ path: 'unit', message: `${body.unit} is not a known unit` }]),
  ];
  if (errors.length > 0)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path}: ${message}`).join('; '), errors);
  const answer = await keepMeasurementProcess(work, body);
  return { answer, events: [{ subject: { kind: 'measurement-process', id: answer.id }, details: { ...body } }] };
}
