import { changeInspection as changeContract, deleteInspection, readInspection } from '@/services/contracts/inspections';
import { Raw, route } from '@/services/http/route';
import { abandonInspection } from '@/services/inspections/abandon-inspection';
import { changeInspection } from '@/services/inspections/change-inspection';
import { describeInspectionNow } from '@/services/inspections/describe-inspection';

export const GET = route({
  contract: readInspection,
  who: 'see-inspections',
  event: null,
  call: async (reading, { params }) => {
    const answer = readInspection.response.parse(await describeInspectionNow(reading, params.id));
    return new Raw(Response.json(answer, { headers: { etag: `"${String(answer.version)}"`, 'cache-control': 'no-store' } }));
  },
});

export const PATCH = route({
  contract: changeContract,
  who: 'inspect',
  event: 'inspection-changed',
  call: (work, { params, body, ifMatch }) => changeInspection(work, params.id, body, ifMatch),
});

export const DELETE = route({
  contract: deleteInspection,
  who: 'inspect',
  event: 'inspection-abandoned',
  call: async (work, { params }) => {
    const { events } = await abandonInspection(work, params.id, null);
    return { answer: undefined, events };
  },
});
