import { z } from 'zod';
import { day, id, instant, mark, page, pageQuery, words } from './common';
import { operation } from './operation';
import { orderClauses } from './order-clauses';

const line = z.object({
  id,
  line: z.int(),
  partNumber: z.string(),
  revision: z.string(),
  quantity: z.int(),
  released: z.int(),
  dueOn: z.string().nullable(),
  clauses: orderClauses,
});
export const order = z.object({
  id,
  number: z.string(),
  purchaseOrder: z.string(),
  customer: z.string(),
  createdAt: instant,
  lines: z.array(line),
});
export type Order = z.output<typeof order>;

export const listOrders = operation({
  name: 'list-orders',
  method: 'GET',
  path: '/api/orders',
  summary: 'Orders with their lines, newest first.',
  changes: false,
  // Whoever gathers a shipment chooses among the open lines, so a page is as long as may be.
  query: pageQuery.extend({ limit: pageQuery.shape.limit.unwrap().default(200), customer: z.string().max(60).optional() }),
  response: page(order),
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
          clauses: orderClauses.prefault({}),
        }),
      )
      .min(1)
      .max(100),
  }),
  response: order,
  status: 201,
});

const customer = z.object({
  id,
  code: z.string(),
  name: z.string(),
  address: z.string(),
  qualityEmail: z.string(),
  locale: z.enum(['en', 'fr']),
  drawings: z.int(),
  orders: z.int(),
  createdAt: instant,
});
export type Customer = z.output<typeof customer>;

export const listCustomers = operation({
  name: 'list-customers',
  method: 'GET',
  path: '/api/customers',
  summary: 'Customers by name.',
  changes: false,
  query: pageQuery.extend({ limit: pageQuery.shape.limit.unwrap().default(200) }),
  response: page(customer),
  status: 200,
});

export const createCustomer = operation({
  name: 'create-customer',
  method: 'POST',
  path: '/api/customers',
  summary: 'Enter a customer; certificates are written in their language and sent to their quality address.',
  changes: true,
  body: z.strictObject({
    code: z
      .string()
      .trim()
      .regex(/^[A-Z0-9][A-Z0-9-]{0,19}$/, 'must be 1 to 20 capital letters, digits or dashes'),
    name: words(120),
    address: words(400),
    qualityEmail: z.email('must be an e-mail address').max(200),
    locale: z.enum(['en', 'fr']).default('en'),
  }),
  response: customer,
  status: 201,
});
