import { EquipmentPage } from '@/components/equipment/equipment-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Equipment() {
  const actor = await pageActor('see-equipment');
  return <EquipmentPage mayKeep={may(actor, 'keep-equipment')} />;
}
