import { WorkstationsPage } from '@/components/workstations/workstations-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Workstations() {
  await pageActor('keep-workstations');
  return <WorkstationsPage />;
}
