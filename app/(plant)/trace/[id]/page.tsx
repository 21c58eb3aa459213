import { TracePage } from '@/components/trace/trace-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Trace({ params }: { params: Promise<{ id: string }> }) {
  await pageActor('see-trace');
  const { id } = await params;
  return <TracePage id={id} />;
}
