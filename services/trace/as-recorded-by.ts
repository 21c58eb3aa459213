import type { Trace } from '@/services/contracts/trace';

type Whole = Omit<Trace, 'recordedBy'>;
type Seen = (at: string | null) => boolean;

/** An instant with six digits after the point, so that instants compare as texts. */
export function microseconds(iso: string): string {
  const [, whole = iso, fraction = ''] = /^(.*?:\d{2})(?:\.(\d+))?Z$/.exec(iso) ?? [];
  return `${whole}.${fraction.slice(0, 6).padEnd(6, '0')}Z`;
}

function findingBy(finding: Whole['findings'][number], seen: Seen): Whole['findings'][number] {
  const dispositions = finding.dispositions.filter(({ decidedAt }) => seen(decidedAt));
  if (seen(finding.closedAt)) return { ...finding, dispositions };
  const later = finding.state === 'closed' ? 'dispositioned' : finding.state;
  return { ...finding, closedAt: null, dispositions, state: dispositions.length === 0 ? 'open' : later };
}

function certificateBy(certificate: Whole['certificates'][number], seen: Seen): Whole['certificates'][number] {
  const withdrawals = certificate.withdrawals.filter(({ withdrawnAt }) => seen(withdrawnAt));
  const receipts = certificate.receipts.filter(({ at }) => seen(at));
  const issuedAt = seen(certificate.issuedAt) ? certificate.issuedAt : null;
  const all = withdrawals.length === certificate.withdrawals.length && issuedAt === certificate.issuedAt;
  const then = withdrawals.some(({ whole }) => whole) ? 'withdrawn' : withdrawals.length > 0 ? 'partly-withdrawn' : 'issued';
  return {
    ...certificate,
    issuedAt,
    withdrawals,
    receipts,
    state: all ? certificate.state : issuedAt === null ? 'signed' : then,
  };
}

function holdBy(hold: Whole['holds'][number], seen: Seen): Whole['holds'][number] {
  return seen(hold.liftedAt) ? hold : { ...hold, liftedAt: null, liftedBy: null, liftedReason: null };
}

/**
 * What of a history was on record by an instant (ISO, UTC, the instant included): later entries are left out, and what
 * they changed in earlier ones is undone. Nothing recorded is ever rewritten, so leaving out is enough.
 */
export function asRecordedBy(history: Whole, instant: string): Whole {
  const until = microseconds(instant);
  const seen: Seen = (at) => at !== null && at <= until;
  const { part } = history;
  return {
    part: {
      ...part,
      findings: part.findings.filter(({ openedAt }) => seen(openedAt)),
      holds: part.holds.filter(({ placedAt }) => seen(placedAt)),
      certificates: part.certificates.filter(({ signedAt }) => seen(signedAt)),
    },
    inspections: history.inspections
      .filter(({ signedAt }) => seen(signedAt))
      .map((one) => (one.ended && !seen(one.ended.at) ? { ...one, ended: null } : one)),
    findings: history.findings.filter(({ openedAt }) => seen(openedAt)).map((one) => findingBy(one, seen)),
    holds: history.holds.filter(({ placedAt }) => seen(placedAt)).map((one) => holdBy(one, seen)),
    certificates: history.certificates.filter(({ signedAt }) => seen(signedAt)).map((one) => certificateBy(one, seen)),
    genealogy: history.genealogy.filter(({ createdAt }) => seen(createdAt)),
    events: history.events.filter(({ at }) => seen(at)),
  };
}
