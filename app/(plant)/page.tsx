import { TodayPage } from '@/components/today/today-page';
import { pageActor } from '@/services/accounts/page-actor';

export default async function Today() {
  const actor = await pageActor('see-today');
  return <TodayPage name={actor.name} role={actor.role} />;
}
