import { createOrder as createContract, listOrders as listContract } from '@/services/contracts/orders';
import { route } from '@/services/http/route';
import { createOrder, listOrders } from '@/services/orders/keep-orders';

export const GET = route({
  contract: listContract,
  who: 'see-orders',
  event: null,
  call: (reading, { query }) => listOrders(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'keep-orders',
  event: 'order-created',
  call: (work, { body }) => createOrder(work, body),
});
