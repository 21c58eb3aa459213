'use client';

import Link from 'next/link';
import { useState } from 'react';
import { usePageScanner } from '@/components/scanner/page-scanner';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Menu } from './menu';
import type { Role } from './navigation';
import { WorkstationSettings } from './workstation-settings';

export interface ShellUser {
  name: string;
  role: Role;
  releaseAuthority?: boolean;
  /** For customer quality: whose. */
  customerName?: string | null;
}

/** Who is here; the account, this workstation, and the way out. */
export function UserMenu({ user }: { user: ShellUser }) {
  const t = useMessages('shell');
  const scanner = useMessages('scanner');
  const { switchPerson } = usePageScanner();
  const [leaving, setLeaving] = useState<'no' | 'yes' | 'failed'>('no');
  const about = [t(`roles.${user.role}`), user.releaseAuthority === true ? t('releaseAuthority') : '', user.customerName ?? '']
    .filter((text) => text !== '')
    .join(' · ');
  const signOut = async () => {
    setLeaving('yes');
    try {
      await sendJson('/api/session', { method: 'DELETE' });
      window.location.assign('/sign-in');
    } catch {
      setLeaving('failed');
    }
  };
  return (
    <Menu
      button={
        <span className="max-w-56 text-left leading-tight">
          <span className="block truncate font-semibold">{user.name}</span>
          <span className="block truncate text-sm text-ink-soft max-lg:hidden">{about}</span>
        </span>
      }
    >
      <Link
        href="/account"
        className="flex min-h-10 items-center rounded px-2 text-accent underline underline-offset-4 hover:bg-accent-wash"
      >
        {t('account')}
      </Link>
      <div className="my-2 border-y border-line py-2">
        <WorkstationSettings />
      </div>
      <Button onClick={switchPerson} className="mb-2 w-full">
        {scanner('switch')}
      </Button>
      <Button busy={leaving === 'yes'} onClick={() => void signOut()} className="w-full">
        {leaving === 'yes' ? t('signingOut') : t('signOut')}
      </Button>
      {leaving === 'failed' && (
        <p role="alert" className="mt-2 text-reject">
          {t('signOutFailed')}
        </p>
      )}
    </Menu>
  );
}
