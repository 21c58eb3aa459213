import { readLot as contract } from '@/services/contracts/parts';
import { route } from '@/services/http/route';
import { readLot } from '@/services/lots/keep-lots';

export const GET = route({ contract, who: 'see-parts', event: null, call: (reading, { params }) => readLot(reading, params.id) });
