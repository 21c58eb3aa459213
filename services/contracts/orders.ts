import { z } from 'zod';
import { day, id, mark, words } from './common';
import { operation } from './operation';

const line = z.object({
  id,
  line: z.int(),
  partNumber: z.string(),
  revision: z.string(),
  quantity: z.int(),
  released: z.int(),
  dueOn: z.string().nullable(),
});
export const order = z.object({ id, number: z.string(), purchaseOrder: z.string(), customer: z.string(), lines: z.array(line) });
export type Order = z.output<typeof order>;

export const listOrders = operation({
  name: 'list-orders',
  method: 'GET',
  path: '/api/orders',
  summary: 'Orders with their lines, newest first, at most 200.',
  changes: false,
  response: z.object({ items: z.array(order), next: z.null() }),
  status: 200,
});

export const createOrder = operation({
  name: 'create-order',
  method: 'POST',
  path: '/api/orders',
  summary: 'Enter a purchase order with its lines.',
  changes: true,
  body: z.strictObject({
    customer: z.string().min(1).max(60),
    purchaseOrder: words(60),
    lines: z
      .array(
        z.strictObject({
          drawing: mark,
          revision: mark,
          quantity: z.int().min(1).max(100000),
          dueOn: day.optional(),
          clauses: z.record(z.string(), z.unknown()).default({}),
        }),
      )
      .min(1)
      .max(100),
  }),
  response: order,
  status: 201,
});
