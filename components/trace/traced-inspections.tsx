'use client';

import Image from 'next/image';
import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import { Digest } from '@/components/ui/digest';
import { VerdictMark, type Verdict } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { Trace } from '@/services/contracts/trace';

type Traced = Trace['inspections'][number];

/** A file with its digest; pictures with a small preview, which the booth leaves out: it would be a lamp. */
function Evidence({ file }: { file: Traced['evidence'][number] }) {
  const t = useMessages('trace');
  const pictured = file.kind === 'radiograph' || file.kind === 'photograph';
  return (
    <li className="flex flex-col gap-1 text-sm">
      {pictured ? (
        <Image
          unoptimized
          className="h-24 w-36 border border-line bg-sunken object-contain [html[data-palette=booth]_&]:hidden"
          src={`/api/evidence/${file.id}/preview`}
          width={144}
          height={96}
          alt={t('preview', { name: file.name })}
        />
      ) : null}
      <span>
        <a href={`/api/evidence/${file.id}`} className="text-accent underline underline-offset-4">
          {file.name}
        </a>{' '}
        <Digest value={file.sha256} />
      </span>
    </li>
  );
}

function Inspection({ one }: { one: Traced }) {
  const t = useMessages('trace');
  return (
    <li className="relative border-l border-line-strong pb-4 pl-5">
      <span aria-hidden className="absolute top-2 -left-1 size-2 rounded-full bg-line-strong" />
      <p className="flex flex-wrap items-baseline gap-x-3">
        <When at={one.signedAt} />
        <Link href={`/inspections/${one.id}`} className="font-mono text-accent underline underline-offset-4">
          {one.number}
        </Link>
        <strong>
          {one.operation} {one.title}
        </strong>
        <VerdictMark verdict={one.verdict as Verdict} />
        <span>{t('signedBy', { by: one.signedBy })}</span>
      </p>
      {one.ended ? (
        <p className="font-semibold text-unsure">
          {t('ended', { kind: one.ended.kind, reason: one.ended.reason })} (<When at={one.ended.at} />)
        </p>
      ) : null}
      <p className="text-sm text-ink-soft">
        {t('people', { names: one.people.join(', ') })}. {t('equipment', { names: one.equipment.join(', ') || '–' })}.{' '}
        {one.technique === null ? null : `${t('technique', { technique: one.technique })}. `}
        {t('digest')} <Digest value={one.recordDigest} />
      </p>
      <ul className="mt-2 flex flex-wrap gap-4">
        {one.evidence.map((file) => (
          <Evidence key={file.id} file={file} />
        ))}
      </ul>
    </li>
  );
}

/** Signed inspections as a line of time, with who, with what, and every file. */
export function TracedInspections({ rows }: { rows: readonly Traced[] }) {
  const t = useMessages('trace');
  if (rows.length === 0) return <p>{t('nothing')}</p>;
  return (
    <ol>
      {rows.map((one) => (
        <Inspection key={one.id} one={one} />
      ))}
    </ol>
  );
}
