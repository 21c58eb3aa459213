import { RunPage } from '@/components/runs/run-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Run({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-inspections');
  const { id } = await params;
  return <RunPage id={id} mayInspect={may(actor, 'inspect')} />;
}
