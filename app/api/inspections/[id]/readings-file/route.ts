import { readingsFile } from '@/services/contracts/inspections';
import { route } from '@/services/http/route';
import { readReadingsFile } from '@/services/inspections/read-readings-file';

export const POST = route({
  contract: readingsFile,
  who: 'inspect',
  event: null,
  call: (reading, { params, query, request }) => readReadingsFile(reading, params.id, query, request),
});
