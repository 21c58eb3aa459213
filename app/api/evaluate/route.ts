import { evaluateCall } from '@/services/contracts/evaluate';
import { route } from '@/services/http/route';
import { evaluateAlone } from '@/services/inspections/ask-engine';

export const POST = route({
  contract: evaluateCall,
  who: 'evaluate',
  event: null,
  call: (_reading, { body }) => Promise.resolve(evaluateAlone(body)),
});
