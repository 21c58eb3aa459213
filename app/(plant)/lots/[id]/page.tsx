import { LotPage } from '@/components/lots/lot-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Lot({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-parts');
  const { id } = await params;
  return <LotPage id={id} mayEnter={may(actor, 'enter-parts')} mayHold={may(actor, 'raise-hold')} />;
}
