import { OrdersPage } from '@/components/orders/orders-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Orders() {
  const actor = await pageActor('see-orders');
  return <OrdersPage mayKeep={may(actor, 'keep-orders')} />;
}
