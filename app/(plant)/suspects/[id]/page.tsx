import { SuspectListPage } from '@/components/suspects/suspect-list-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function OneSuspectList({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-equipment');
  const { id } = await params;
  return <SuspectListPage id={id} mayClose={may(actor, 'close-suspects')} />;
}
