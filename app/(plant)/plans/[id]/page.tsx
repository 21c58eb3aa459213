import { PlanPage } from '@/components/plans/plan-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Plan({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-plans');
  const { id } = await params;
  return <PlanPage id={id} me={actor.id} mayPrepare={may(actor, 'prepare-plans')} mayApprove={may(actor, 'approve-plans')} />;
}
