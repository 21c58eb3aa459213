'use client';

import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { DefinitionList } from '@/components/ui/definition-list';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { OwnAccount } from '@/services/contracts/accounts';
import { LanguageForm } from './language-form';
import { PasswordForm } from './password-form';
import { PinForm } from './pin-form';
import { SessionsPanel, SignInsPanel } from './sign-in-history';

/** Who signs at a bench has use for a PIN. */
const signs = ({ role }: OwnAccount) => role === 'inspector' || role === 'reviewer';

function Identity({ account, onKept }: { account: OwnAccount; onKept: (next: OwnAccount) => void }) {
  const t = useMessages('accounts');
  const words = useMessages('shell');
  const role = words(`roles.${account.role}`) + (account.releaseAuthority ? ` · ${words('releaseAuthority')}` : '');
  return (
    <Panel title={t('who')}>
      <DefinitionList
        items={[
          { term: t('name'), value: account.name },
          { term: t('email'), value: account.email },
          { term: t('role'), value: role },
          ...(account.customer === null ? [] : [{ term: t('customer'), value: account.customer }]),
          ...(account.accessUntil === null ? [] : [{ term: t('accessUntil'), value: <When at={account.accessUntil} /> }]),
          ...(signs(account) ? [{ term: t('signing'), value: t(`pinStates.${account.pin}`) }] : []),
        ]}
      />
      <div className="mt-4">
        <LanguageForm locale={account.locale} onKept={onKept} />
      </div>
    </Panel>
  );
}

/** The own account. */
export function AccountPage() {
  const t = useMessages('accounts');
  const { answer: account, problem, renew } = useAnswer<OwnAccount>('/api/account');
  return (
    <>
      <PageHeader title={t('account')} subtitle={t('accountSubtitle')} />
      {problem ? <ProblemNotice problem={problem} /> : null}
      {account ? (
        <div className="grid items-start gap-4 lg:grid-cols-[minmax(0,1fr)_22rem]">
          <div className="flex min-w-0 flex-col gap-4">
            <Identity account={account} onKept={(next) => void renew(next)} />
            <SessionsPanel sessions={account.sessions} />
            <SignInsPanel signIns={account.signIns} />
          </div>
          <div className="flex flex-col gap-4">
            <Panel title={t('passwordTitle')}>
              <PasswordForm email={account.email} onDone={() => void renew()} />
            </Panel>
            {signs(account) ? (
              <Panel title={t('pinTitle')}>
                <PinForm onDone={() => void renew()} />
              </Panel>
            ) : null}
          </div>
        </div>
      ) : problem ? null : (
        <Skeleton lines={8} />
      )}
    </>
  );
}
