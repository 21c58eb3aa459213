import { PeoplePage } from '@/components/accounts/people-page';
import { pageActor } from '@/services/accounts/page-actor';
import { customersToChoose } from '@/services/accounts/people';

export default async function People() {
  const actor = await pageActor('keep-accounts');
  return <PeoplePage ownId={actor.id} customers={await customersToChoose()} />;
}
