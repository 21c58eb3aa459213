import { SuspectsPage } from '@/components/suspects/suspects-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Suspects() {
  await pageActor('see-equipment');
  return <SuspectsPage />;
}
