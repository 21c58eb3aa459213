import { DrawingsPage } from '@/components/plans/drawings-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Drawings() {
  const actor = await pageActor('see-plans');
  return <DrawingsPage mayPrepare={may(actor, 'prepare-plans')} />;
}
