import { PartPage } from '@/components/parts/part-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Part({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-parts');
  const { id } = await params;
  return <PartPage id={id} mayInspect={may(actor, 'inspect')} mayHold={may(actor, 'raise-hold')} />;
}
