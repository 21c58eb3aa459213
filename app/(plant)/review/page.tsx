import { ReviewPage } from '@/components/findings/review-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Review() {
  await pageActor('see-findings');
  return <ReviewPage />;
}
