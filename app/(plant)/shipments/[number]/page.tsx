import { ShipmentPage } from '@/components/shipments/shipment-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Shipment({ params }: { params: Promise<{ number: string }> }) {
  const actor = await pageActor('see-shipments');
  const { number } = await params;
  return <ShipmentPage number={number} mayGather={may(actor, 'gather-shipment')} maySign={may(actor, 'sign-release')} />;
}
