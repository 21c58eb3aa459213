import type { Order } from '../../services/contracts/orders';
import { select, type Reading } from '../work';

type Row = Omit<Order, 'lines'> & {
  lineId: string;
  line: number;
  partNumber: string;
  revision: string;
  quantity: number;
  released: number;
  dueOn: string | null;
};

/** Orders with their lines, newest first; one order when an id is given. */
export async function ordersWithLines(reading: Reading, orderId: string | null = null): Promise<Order[]> {
  const rows = await select<Row>(
    reading,
    `SELECT o.id, o.number, o.purchase_order AS purchaseOrder, c.name AS customer, l.id AS lineId, l.line, d.number AS partNumber, r.revision, l.quantity, l.released, DATE_FORMAT(l.due_on, '%Y-%m-%d') AS dueOn
     FROM (SELECT id FROM orders WHERE ? IS NULL OR CAST(id AS CHAR) = ? ORDER BY created_at DESC LIMIT 200) page JOIN orders o ON o.id = page.id JOIN customers c ON c.id = o.customer_id JOIN order_lines l ON l.order_id = o.id
     JOIN drawing_revisions r ON r.id = l.drawing_revision_id JOIN drawings d ON d.id = r.drawing_id ORDER BY o.created_at DESC, o.number DESC, l.line`,
    [orderId, orderId],
  );
  const found = new Map<string, Order>();
  for (const { lineId, line, partNumber, revision, quantity, released, dueOn, ...rest } of rows) {
    const one = found.get(rest.id) ?? { ...rest, lines: [] };
    one.lines.push({ id: lineId, line, partNumber, revision, quantity, released, dueOn });
    found.set(rest.id, one);
  }
  return [...found.values()];
}
