import { customerByKey, drawingByNumber, drawingRevisions, drawings } from '@/db/repositories/drawings';
import { newId } from '@/db/identity';
import { insert } from '@/db/models/table';
import type { Work } from '@/db/work';
import type { BodyOf } from '@/services/contracts/operation';
import type { createDrawing as contract, Drawing } from '@/services/contracts/plans';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';

/** Enters a drawing, or a further revision when the number is known and its customer the same. */
export async function createDrawing(work: Work, body: BodyOf<typeof contract>): Promise<Recorded<Drawing>> {
  const customer = await customerByKey(work, body.customer);
  if (!customer)
    throw new Problem('invalid-input', 'customer: is not known', [{ path: 'customer', message: 'is not a known customer code' }]);
  const known = await drawingByNumber(work, body.number);
  if (known && known.customer.id !== customer.id) {
    throw new Problem('already-exists', `Drawing ${body.number} belongs to another customer.`, [
      { path: 'number', message: 'belongs to another customer' },
    ]);
  }
  if (known?.revisions.some(({ revision }) => revision === body.revision)) {
    throw new Problem('already-exists', `Drawing ${body.number} already has revision ${body.revision}.`, [
      { path: 'revision', message: 'is already entered' },
    ]);
  }
  const drawingId = known?.id ?? newId();
  if (!known)
    await insert(work, drawings, {
      id: drawingId,
      number: body.number,
      title: body.title,
      customerId: customer.id,
      version: 0,
      createdAt: work.now,
    });
  await insert(work, drawingRevisions, { id: newId(), drawingId, revision: body.revision, createdAt: work.now });
  const answer = await drawingByNumber(work, body.number);
  if (!answer) throw new Error('the drawing just written is not there');
  return {
    answer,
    events: [
      {
        kind: known ? 'revision-added' : 'drawing-created',
        subject: { kind: 'drawing', id: drawingId },
        details: { number: body.number, revision: body.revision },
      },
    ],
  };
}
