import { redirect } from 'next/navigation';
import type { ReactNode } from 'react';
import { Shell } from '@/components/shell/shell';
import { currentActor } from '@/services/accounts/page-actor';

export default async function PlantLayout({ children }: { children: ReactNode }) {
  const actor = await currentActor();
  if (!actor) redirect('/sign-in');
  return (
    <Shell
      user={{ name: actor.name, role: actor.role, releaseAuthority: actor.releaseAuthority, customerName: actor.customerName }}
    >
      {children}
    </Shell>
  );
}
