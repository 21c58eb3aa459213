import { BasketsPage } from '@/components/baskets/baskets-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Baskets() {
  const actor = await pageActor('see-inspections');
  return <BasketsPage me={{ id: actor.id }} mayInspect={may(actor, 'inspect')} />;
}
