import { CustomersPage } from '@/components/customers/customers-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Customers() {
  const actor = await pageActor('see-orders');
  return <CustomersPage mayKeep={may(actor, 'keep-orders')} />;
}
