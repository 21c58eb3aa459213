import { newId } from '@/db/identity';
import { customerById, listCustomers as rowsOf } from '@/db/repositories/customers';
import { customerByKey } from '@/db/repositories/drawings';
import { execute, sqlTimeOf, type Reading, type Work } from '@/db/work';
import type { AnswerOf, BodyOf, QueryOf } from '@/services/contracts/operation';
import type { createCustomer as createContract, Customer, listCustomers as listContract } from '@/services/contracts/orders';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';

/** Customers by name. */
export async function listCustomers(
  reading: Reading,
  query: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const after = partsOfKey(query.after, 2);
  const rows = await rowsOf(reading, query.limit + 1, after && [String(after[0]), String(after[1])]);
  return pageOf(
    rows,
    query.limit,
    ({ name, id }) => [name, id],
    (row) => row,
  );
}

/** Enters a customer. Problem already-exists, on the code. */
export async function createCustomer(work: Work, body: BodyOf<typeof createContract>): Promise<Recorded<Customer>> {
  if (await customerByKey(work, body.code))
    throw new Problem('already-exists', `There already is a customer ${body.code}.`, [
      { path: 'code', message: 'is already given to another customer' },
    ]);
  const id = newId();
  await execute(
    work,
    'INSERT INTO customers (id, code, name, address, locale, quality_email, created_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [id, body.code, body.name, body.address, body.locale, body.qualityEmail, sqlTimeOf(work.now)],
  );
  const answer = await customerById(work, id);
  if (!answer) throw new Error('the customer just written is not there');
  return { answer, events: [{ subject: { kind: 'customer', id }, details: { code: body.code, name: body.name } }] };
}
