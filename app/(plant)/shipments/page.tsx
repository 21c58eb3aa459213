import { ShipmentsPage } from '@/components/shipments/shipments-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Shipments() {
  const actor = await pageActor('see-shipments');
  return <ShipmentsPage mayGather={may(actor, 'gather-shipment')} />;
}
