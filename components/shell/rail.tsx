'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useMessages } from '@/components/theme/use-messages';
import { isHere, navigationFor } from './navigation';
import type { Role } from './navigation';

/** The pages of a role. Where the reader is, the line is full width, as in the ring; elsewhere thin. */
export function Rail({ role, onGo }: { role: Role; onGo?: () => void }) {
  const t = useMessages('shell');
  const path = usePathname();
  return (
    <nav aria-label={t('navigation')} className="flex flex-col gap-3 py-3">
      {navigationFor(role).map(({ group, items }) => (
        <div key={group}>
          <p className="px-4 pb-1 text-sm text-ink-soft">{t(`groups.${group}`)}</p>
          <ul>
            {items.map(({ href, label }) => (
              <li key={href}>
                <Link
                  href={href}
                  onClick={onGo}
                  aria-current={isHere(href, path) ? 'page' : undefined}
                  className="relative flex min-h-8 items-center pr-3 pl-6 before:absolute before:inset-y-0.5 before:left-4 before:w-px before:bg-line-strong hover:bg-accent-wash hover:text-accent aria-[current]:font-semibold aria-[current]:text-accent aria-[current]:before:-ml-1 aria-[current]:before:w-1.5 aria-[current]:before:bg-accent pointer-coarse:min-h-11"
                >
                  {t(`pages.${label}`)}
                </Link>
              </li>
            ))}
          </ul>
        </div>
      ))}
    </nav>
  );
}
