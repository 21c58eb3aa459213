import { inspects } from '@/db/repositories/accounts';
import { keepVisionTest, visionTestById } from '@/db/repositories/personnel';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { recordVisionTest as contract, VisionTest } from '@/services/contracts/personnel';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { plantToday } from './plant-today';

/** Records a vision test of an inspector or reviewer. Problem: invalid-input. */
export async function recordVisionTest(
  work: Work & { readonly actor: Actor },
  body: BodyOf<typeof contract>,
): Promise<Recorded<VisionTest>> {
  const today = await plantToday(work);
  const staff = await inspects(work, body.person);
  const errors: FieldError[] = [
    ...(staff ? [] : [{ path: 'person', message: 'is not an inspector or reviewer of this plant' }]),
    ...(body.testedOn > today.day ? [{ path: 'testedOn', message: 'lies in the future' }] : []),
  ];
  if (errors.length > 0)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path}: ${message}`).join('; '), errors);
  const id = await keepVisionTest(work, { ...body, recordedBy: work.actor.id });
  const answer = await visionTestById(work, today, id);
  if (!answer) throw new Error('the vision test just recorded is not there');
  const { test, result, corrected, testedOn } = body;
  return {
    answer,
    events: [
      {
        subject: { kind: 'vision-test', id },
        also: [{ kind: 'account', id: body.person }],
        details: { test, result, corrected, testedOn },
      },
    ],
  };
}
