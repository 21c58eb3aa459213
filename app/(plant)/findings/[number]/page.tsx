import { FindingPage } from '@/components/findings/finding-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Finding({ params }: { params: Promise<{ number: string }> }) {
  const actor = await pageActor('see-findings');
  const { number } = await params;
  return <FindingPage number={number} name={actor.name} mayDecide={may(actor, 'disposition')} />;
}
