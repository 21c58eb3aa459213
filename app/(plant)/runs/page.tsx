import { RunsPage } from '@/components/runs/runs-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Runs() {
  const actor = await pageActor('see-inspections');
  return <RunsPage me={{ id: actor.id }} mayInspect={may(actor, 'inspect')} />;
}
