import { PartsPage } from '@/components/parts/parts-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Parts() {
  await pageActor('see-parts');
  return <PartsPage />;
}
