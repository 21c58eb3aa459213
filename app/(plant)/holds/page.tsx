import { HoldsPage } from '@/components/holds/holds-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Holds() {
  const actor = await pageActor('see-parts');
  return <HoldsPage mayLift={may(actor, 'lift-hold')} />;
}
