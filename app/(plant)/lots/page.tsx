import { LotsPage } from '@/components/lots/lots-page';
import { pageActor } from '@/services/accounts/page-actor';
import { may } from '@/services/accounts/permissions';

export default async function Lots() {
  const actor = await pageActor('see-parts');
  return <LotsPage mayEnter={may(actor, 'enter-parts')} />;
}
