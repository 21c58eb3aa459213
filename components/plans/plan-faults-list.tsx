'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Notice } from '@/components/ui/notice';
import type { Fault } from '@/services/engine/evaluate/fault';

const most = 12;

/** Opens the tab that holds a field and goes to it. */
function goTo(path: string): void {
  const field = document.querySelector<HTMLElement>(`[data-path="${CSS.escape(path)}"]`);
  const panel = field?.closest('[role=tabpanel]');
  const tab = panel && document.getElementById(panel.getAttribute('aria-labelledby') ?? '');
  tab?.click();
  requestAnimationFrame(() => field?.focus());
}

/** Everything that still stands against checking and approving, all at once, each leading to its field. */
export function PlanFaults({ faults }: { readonly faults: readonly Fault[] }) {
  const t = useMessages('plans');
  if (faults.length === 0) return <Notice kind="done" title={t('noFaults')} />;
  return (
    <Notice kind="unsure" title={t('faults', { count: faults.length })}>
      <ul className="mt-1 flex flex-col gap-0.5">
        {faults.slice(0, most).map(({ path, message }) => (
          <li key={`${path} ${message}`}>
            <button type="button" className="control text-left underline underline-offset-4" onClick={() => goTo(path)}>
              <span className="font-mono">{path}</span> {message}
            </button>
          </li>
        ))}
      </ul>
      {faults.length > most ? <p>{t('moreFaults', { count: faults.length - most })}</p> : null}
    </Notice>
  );
}
