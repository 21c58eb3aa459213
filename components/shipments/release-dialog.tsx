'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { Shipment } from '@/services/contracts/shipments';

/** The release's sentence and the signatory's password. */
export function ReleaseDialog({ shipment, onSigned }: { shipment: Shipment; onSigned: () => void }) {
  const t = useMessages('shipments');
  const [open, setOpen] = useState(false);
  const [password, setPassword] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const sign = async () => {
    setBusy(true);
    setProblem(undefined);
    try {
      await sendJson(`/api/shipments/${shipment.number}/release`, { body: { password } });
      setOpen(false);
      onSigned();
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setPassword('');
    setBusy(false);
  };
  return (
    <>
      <Button kind="primary" size="capture" disabled={!shipment.releasable} onClick={() => setOpen(true)}>
        {t('release')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('release')} width="wide">
        <form
          className="flex flex-col gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            if (!busy) void sign();
          }}
        >
          <p className="border-s-4 border-accent ps-3">{shipment.sentence}</p>
          {problem ? <ProblemNotice problem={problem} /> : null}
          <label className="flex flex-col gap-1">
            <span className="font-semibold">{t('password')}</span>
            <input
              className="field"
              type="password"
              autoComplete="current-password"
              value={password}
              onChange={(event) => setPassword(event.target.value)}
            />
          </label>
          <div className="flex gap-3">
            <Button kind="primary" size="capture" type="submit" busy={busy} disabled={password === ''}>
              {t('signNow')}
            </Button>
            <Button size="capture" onClick={() => setOpen(false)}>
              {t('close')}
            </Button>
          </div>
        </form>
      </Dialog>
    </>
  );
}
