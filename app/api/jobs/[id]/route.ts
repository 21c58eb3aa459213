import { readJob as contract } from '@/services/contracts/jobs';
import { route } from '@/services/http/route';
import { readJob } from '@/services/jobs/read-job';

export const GET = route({ contract, who: 'see-jobs', event: null, call: (reading, { params }) => readJob(reading, params.id) });
