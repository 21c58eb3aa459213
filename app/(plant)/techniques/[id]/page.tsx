import { TechniquePage } from '@/components/techniques/technique-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function OneTechnique({ params }: { params: Promise<{ id: string }> }) {
  const actor = await pageActor('see-plans');
  const { id } = await params;
  return (
    <TechniquePage
      id={id}
      reader={{
        id: actor.id,
        name: actor.name,
        mayWrite: may(actor, 'prepare-techniques'),
        mayApprove: may(actor, 'approve-plans'),
        mayRecord: may(actor, 'keep-equipment'),
      }}
    />
  );
}
