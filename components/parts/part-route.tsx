'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import { DataTable } from '@/components/ui/data-table';
import { Panel } from '@/components/ui/panel';
import { Ring } from '@/components/ui/ring';
import { StateWord } from '@/components/ui/state-word';
import type { Part } from '@/services/contracts/parts';
import { OpenInspection } from './open-inspection';

type Requirement = Part['requirements'][number];

/** States of a requirement in which an inspection of it can begin or go on. */
const begins: readonly string[] = ['open', 'in-work', 'to-be-repeated'];

function RequirementAction({ part, one, mayInspect }: { part: Part; one: Requirement; mayInspect: boolean }) {
  const t = useMessages('parts');
  const open = begins.includes(one.state) && mayInspect && !part.held;
  return (
    <span className="flex flex-wrap items-center gap-3">
      {one.inspection ? (
        <Link className="text-accent underline underline-offset-4" href={`/inspections/${one.inspection.id}`}>
          {t('read', { number: one.inspection.number })}
        </Link>
      ) : null}
      {open ? (
        <OpenInspection
          part={part.id}
          requirement={one.id}
          label={t(one.draft ? 'goOn' : 'begin', { operation: one.operation, title: one.title })}
        />
      ) : null}
    </span>
  );
}

/** Where a segment leads: the inspection that stands for it, the draft, or the row that offers to begin one. */
function hrefOf({ id, inspection, draft }: Requirement): string {
  if (draft) return `/inspections/${draft.id}`;
  return inspection ? `/inspections/${inspection.id}` : `#op-${id}`;
}

/** What comes next on the route, and what stands in the way of it. */
function Next({ part, mayInspect }: { part: Part; mayInspect: boolean }) {
  const t = useMessages('parts');
  const undecided = part.findings.filter(({ state }) => state !== 'closed');
  const next = part.requirements.find(({ state }) => begins.includes(state));
  return (
    <div className="flex flex-col items-start gap-3">
      {undecided.map((one) => (
        <p key={one.number}>
          <StateWord state={one.state} />{' '}
          <Link className="font-mono text-accent underline underline-offset-4" href={`/findings/${one.number}`}>
            {one.number}
          </Link>
        </p>
      ))}
      {next === undefined ? (
        <p className="text-lg font-semibold">{t(part.met === part.required ? 'routeDone' : 'routeWaits')}</p>
      ) : (
        <>
          <h3 className="text-lg font-semibold">{t('comesNext')}</h3>
          <p className="text-xl">
            <span className="font-mono">{next.operation}</span> {next.title}
          </p>
          {mayInspect && !part.held ? (
            <OpenInspection
              next
              part={part.id}
              requirement={next.id}
              label={t(next.draft ? 'goOn' : 'begin', { operation: next.operation, title: next.title })}
            />
          ) : null}
        </>
      )}
    </div>
  );
}

/** The ring with what comes next beside it, and the whole route below. */
export function PartRoute({ part, mayInspect }: { part: Part; mayInspect: boolean }) {
  const t = useMessages('parts');
  return (
    <Panel title={t('route')}>
      <div className="grid items-center gap-6 md:grid-cols-[20rem_minmax(0,1fr)]">
        <Ring
          size="large"
          held={part.held}
          pointerOnly
          segments={part.requirements.map((one) => ({ ...one, title: `${one.operation} ${one.title}`, href: hrefOf(one) }))}
        />
        <Next part={part} mayInspect={mayInspect} />
      </div>
      <DataTable<Requirement>
        caption={t('route')}
        rows={part.requirements}
        rowKey={(row) => row.id}
        columns={[
          { key: 'operation', title: t('operation'), cell: (row) => <span id={`op-${row.id}`}>{row.operation}</span> },
          { key: 'title', title: t('ring'), cell: (row) => row.title, names: true },
          { key: 'state', title: t('state'), cell: (row) => <StateWord state={row.state} /> },
          { key: 'act', title: t('act'), cell: (row) => <RequirementAction part={part} one={row} mayInspect={mayInspect} /> },
        ]}
      />
    </Panel>
  );
}
