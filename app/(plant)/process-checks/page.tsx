import { ChecksPage } from '@/components/checks/checks-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function ProcessChecks() {
  const actor = await pageActor('see-equipment');
  return <ChecksPage mayRecord={may(actor, 'record-checks')} />;
}
