import { createCustomer as createContract, listCustomers as listContract } from '@/services/contracts/orders';
import { createCustomer, listCustomers } from '@/services/customers/keep-customers';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'see-orders',
  event: null,
  call: (reading, { query }) => listCustomers(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'keep-orders',
  event: 'customer-created',
  call: (work, { body }) => createCustomer(work, body),
});
