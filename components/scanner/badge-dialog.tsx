'use client';

import { useRef, useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { Here } from '@/services/contracts/workstations';
import { placeOf } from './badge-text';

interface Entered {
  readonly user: { readonly id: string; readonly name: string };
}

function BadgeForm({ badge, onClose }: { badge: string; onClose: () => void }) {
  const t = useMessages('scanner');
  const [email, setEmail] = useState('');
  const [pin, setPin] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const pressed = useRef(false);
  const enter = async (event: FormEvent) => {
    event.preventDefault();
    if (pressed.current) return;
    pressed.current = true;
    setBusy(true);
    setProblem(undefined);
    try {
      const { user } = await sendJson<Entered>('/api/sittings', { body: { ...(badge === '' ? { email } : { badge }), pin } });
      // A whole new page: nothing of the person before stays in it.
      window.location.assign(placeOf(user.id));
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setPin('');
    setBusy(false);
    pressed.current = false;
  };
  return (
    <form data-density="capture" className="flex flex-col gap-4" onSubmit={(event) => void enter(event)}>
      {problem ? <ProblemNotice problem={problem} /> : null}
      {badge === '' ? (
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('email')}</span>
          <input
            className="field"
            type="email"
            autoComplete="username"
            autoFocus
            value={email}
            onChange={(event) => setEmail(event.target.value)}
          />
          <span className="text-sm text-ink-soft">{t('orBadge')}</span>
        </label>
      ) : (
        <p className="font-semibold">{t('badgeRead')}</p>
      )}
      <label className="flex max-w-60 flex-col gap-1">
        <span className="font-semibold">{t('pin')}</span>
        <input
          className="field font-mono text-xl"
          type="password"
          inputMode="numeric"
          autoComplete="off"
          autoFocus={badge !== ''}
          value={pin}
          onChange={(event) => setPin(event.target.value)}
        />
      </label>
      <div className="flex gap-3">
        <Button kind="primary" size="capture" type="submit" busy={busy} disabled={pin === '' || (badge === '' && email === '')}>
          {t('go')}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('cancel')}
        </Button>
      </div>
    </form>
  );
}

/** One person goes, another takes the place: badge or e-mail, and PIN. The badge may be scanned while this is open. */
export function BadgeDialog({ badge, here, onClose }: { badge: string; here: Here | undefined; onClose: () => void }) {
  const t = useMessages('scanner');
  return (
    <Dialog open onClose={onClose} title={t('switch')}>
      {here && here.workstation === null ? (
        <div className="flex flex-col gap-4">
          <Notice kind="unsure" title={t('notRegistered')}>
            {t('notRegisteredHint')}
          </Notice>
          <div>
            <LinkButton href="/sign-in" size="capture">
              {t('signIn')}
            </LinkButton>
          </div>
        </div>
      ) : (
        <BadgeForm key={badge} badge={badge} onClose={onClose} />
      )}
    </Dialog>
  );
}
