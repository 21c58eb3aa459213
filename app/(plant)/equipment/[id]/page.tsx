import { EquipmentDetail } from '@/components/equipment/equipment-detail';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function OneEquipment({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-equipment');
  const { id } = await params;
  return <EquipmentDetail id={id} mayKeep={may(actor, 'keep-equipment')} />;
}
