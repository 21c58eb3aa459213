import type { ReactNode } from 'react';
import { Shell } from '@/components/shell/shell';
import { askToSignIn, currentActor } from '@/services/accounts/page-actor';
import { pagePlant } from '@/services/accounts/page-plant';

export default async function PlantLayout({ children }: { children: ReactNode }) {
  const actor = await currentActor();
  if (!actor) return askToSignIn();
  const plant = await pagePlant();
  return (
    <Shell
      user={{ name: actor.name, role: actor.role, releaseAuthority: actor.releaseAuthority, customerName: actor.customerName }}
      plant={{ name: plant.name, timeZone: plant.zone }}
    >
      {children}
    </Shell>
  );
}
