import { PersonnelPage } from '@/components/personnel/personnel-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';
import { peopleToAuthorise } from '@/services/personnel/list-personnel';

export default async function Personnel() {
  const actor = await pageActor('see-personnel');
  return (
    <PersonnelPage
      reader={{ id: actor.id, name: actor.name, mayApprove: may(actor, 'approve-personnel') }}
      people={await peopleToAuthorise()}
      mayPrepare={may(actor, 'prepare-personnel')}
      mayRecord={may(actor, 'record-vision')}
    />
  );
}
