import { AccountPage } from '@/components/accounts/account-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Account() {
  await pageActor('own-account');
  return <AccountPage />;
}
