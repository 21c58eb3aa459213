import { notFound } from 'next/navigation';
import { HoldTagsPage } from '@/components/baskets/hold-tags-page';
import { pageActor } from '@/services/accounts/page-actor';
import { readHoldTags } from '@/services/baskets/hold-tags';

export default async function HoldTags({ params }: { params: Promise<{ id: string }> }) {
  await pageActor('see-inspections');
  const { id } = await params;
  const found = /^[0-9a-f-]{36}$/i.test(id) ? await readHoldTags(id) : undefined;
  if (!found) notFound();
  return <HoldTagsPage id={id} number={found.number} tags={found.tags} />;
}
