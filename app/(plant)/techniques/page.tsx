import { TechniquesPage } from '@/components/techniques/techniques-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Techniques() {
  const actor = await pageActor('see-plans');
  return <TechniquesPage mayWrite={may(actor, 'prepare-techniques')} />;
}
