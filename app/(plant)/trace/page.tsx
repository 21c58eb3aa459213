import { TraceSearch } from '@/components/trace/trace-search';
import { pageActor } from '@/services/accounts/page-actor';

export default async function TraceStart() {
  await pageActor('see-trace');
  return <TraceSearch />;
}
