import { BenchPage } from '@/components/inspections/bench';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Inspection({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-inspections');
  const { id } = await params;
  return <BenchPage id={id} me={{ id: actor.id, name: actor.name }} maySign={may(actor, 'inspect')} />;
}
