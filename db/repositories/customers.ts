import type { Customer } from '../../services/contracts/orders';
import { isoOf, select, selectOne, type Reading } from '../work';

const query = `SELECT c.id, c.code, c.name, c.address, c.quality_email AS qualityEmail, c.locale, ${isoOf('c.created_at')} AS createdAt,
  (SELECT COUNT(*) FROM drawings d WHERE d.customer_id = c.id) AS drawings, (SELECT COUNT(*) FROM orders o WHERE o.customer_id = c.id) AS orders FROM customers c`;

/** Customers by name after a key. */
export function listCustomers(reading: Reading, limit: number, after: readonly [string, string] | null): Promise<Customer[]> {
  return select(
    reading,
    `${query} ${after ? 'WHERE c.name >= ? AND (c.name > ? OR c.id > ?)' : ''} ORDER BY c.name, c.id LIMIT ?`,
    after ? [after[0], after[0], after[1], limit] : [limit],
  );
}

export function customerById(reading: Reading, customerId: string): Promise<Customer | undefined> {
  return selectOne(reading, `${query} WHERE c.id = ?`, [customerId]);
}
