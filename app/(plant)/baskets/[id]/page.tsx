import { BasketPage } from '@/components/baskets/basket-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Basket({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-inspections');
  const { id } = await params;
  return <BasketPage id={id} me={{ id: actor.id, name: actor.name }} mayInspect={may(actor, 'inspect')} />;
}
