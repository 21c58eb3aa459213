'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { Dialog } from '@/components/ui/dialog';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { AccountAnswer } from '@/services/contracts/accounts';
import { MachineTokensPanel } from './machine-tokens-panel';
import { NewPersonForm } from './new-person-form';
import { PageTurner, usePageTrail } from './page-trail';
import { PersonDialog } from './person-dialog';

function PeopleTable({ people, onChange }: { people: readonly AccountAnswer[]; onChange: (person: AccountAnswer) => void }) {
  const t = useMessages('accounts');
  const words = useMessages('shell');
  return (
    <DataTable
      caption={t('people')}
      rows={people}
      rowKey={(row) => row.id}
      columns={[
        {
          key: 'name',
          title: t('name'),
          names: true,
          cell: (row) => (
            <>
              <span className="block font-semibold">{row.name}</span>
              <span className="block text-sm break-all text-ink-soft">{row.email}</span>
            </>
          ),
        },
        {
          key: 'role',
          title: t('role'),
          cell: (row) => (
            <>
              <span className="block">{words(`roles.${row.role}`)}</span>
              {row.releaseAuthority ? <span className="block text-sm">{words('releaseAuthority')}</span> : null}
              {row.customer ? <span className="block text-sm text-ink-soft">{row.customer.name}</span> : null}
            </>
          ),
        },
        { key: 'until', title: t('accessUntil'), cell: (row) => <When at={row.accessUntil} to="day" /> },
        {
          key: 'status',
          title: t('status'),
          cell: (row) => <StateWord state={row.disabledAt === null ? 'active' : 'disabled'} />,
        },
        { key: 'last', title: t('lastSignIn'), cell: (row) => <When at={row.lastSignInAt} /> },
        {
          key: 'change',
          title: t('changePerson'),
          cell: (row) => (
            <Button aria-label={t('changeOf', { name: row.name })} onClick={() => onChange(row)}>
              {t('changePerson')}
            </Button>
          ),
        },
      ]}
    />
  );
}

/** Accounts and machine tokens, for the administrator. */
export function PeoplePage({ ownId, customers }: { ownId: string; customers: readonly { id: string; name: string }[] }) {
  const t = useMessages('accounts');
  const people = usePageTrail<AccountAnswer>('/api/people?limit=100');
  const [open, setOpen] = useState<AccountAnswer>();
  const [adding, setAdding] = useState(false);
  return (
    <>
      <PageHeader
        title={t('people')}
        subtitle={t('peopleSubtitle')}
        actions={
          <Button kind="primary" onClick={() => setAdding(true)}>
            {t('newPerson')}
          </Button>
        }
      />
      <div className="flex flex-col gap-4">
        <Panel flush>
          {people.problem ? <ProblemNotice problem={people.problem} /> : null}
          {people.answer ? <PeopleTable people={people.answer.items} onChange={setOpen} /> : <Skeleton lines={8} />}
          <PageTurner forward={people.forward} back={people.back} />
        </Panel>
        <MachineTokensPanel />
      </div>
      <Dialog open={adding} onClose={() => setAdding(false)} title={t('newPerson')}>
        <NewPersonForm customers={customers} onMade={() => void people.renew()} />
      </Dialog>
      <PersonDialog
        person={open}
        ownId={ownId}
        onClose={() => setOpen(undefined)}
        onChanged={() => {
          setOpen(undefined);
          void people.renew();
        }}
      />
    </>
  );
}
