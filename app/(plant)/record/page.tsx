import { RecordPage } from '@/components/record/record-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Journal() {
  await pageActor('see-record');
  return <RecordPage />;
}
