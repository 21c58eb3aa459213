import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { Shell } from '@/components/shell/shell';
import { thePlant } from '@/db/repositories/plants';
import { reading } from '@/db/work';
import { currentActor } from '@/services/accounts/page-actor';

export default async function PlantLayout({ children }: { children: ReactNode }) {
  const actor = await currentActor();
  if (!actor) redirect('/sign-in');
  const plant = await thePlant(reading());
  return (
    <Shell
      user={{ name: actor.name, role: actor.role, releaseAuthority: actor.releaseAuthority, customerName: actor.customerName }}
      plant={{ name: plant.name, timeZone: plant.zone }}
    >
      {children}
    </Shell>
  );
}
