import type { ReactNode } from 'react';
import { PublicFrame } from '@/components/shell/public-frame';
import { pagePlant } from '@/services/accounts/page-plant';

export default async function PublicLayout({ children }: { children: ReactNode }) {
  const plant = await pagePlant();
  return <PublicFrame plant={{ name: plant.name, timeZone: plant.zone }}>{children}</PublicFrame>;
}
