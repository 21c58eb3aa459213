import { readOpenapi } from '@/services/contracts/openapi';
import { route } from '@/services/http/route';
import { openapiDocument } from '@/services/openapi/describe';

export const GET = route({
  contract: readOpenapi,
  who: 'anyone',
  event: null,
  call: () => Promise.resolve(openapiDocument()),
});
