import { withdraw } from '@/services/certificates/answer-certificate';
import { issue } from '@/services/certificates/issue';
import { dispositionFinding } from '@/services/findings/disposition-finding';
import { placeHold } from '@/services/holds/keep-holds';
import { signRelease } from '@/services/releases/sign-release';
import { createShipment } from '@/services/shipments/gather-shipment';
import { execute, inTransaction, reading, selectOne } from '../work';
import { findGaugeOut } from './demo-equipment';
import { inspect, type Shop } from './demo-inspections';
import type { DemoParts } from './demo-lots';
import { castMember, demoPassword, type Cast } from './demo-people';
import type { Rejected } from './demo-story';
import { perform } from './perform';

export interface DecisionContext {
  readonly people: Cast;
  readonly parts: DemoParts;
  readonly shop: Shop;
  readonly rejected: Rejected;
  readonly orderLines: Readonly<Record<string, string>>;
  readonly heats: Readonly<Record<string, string>>;
}

async function decide({ people, parts, shop, rejected }: DecisionContext): Promise<void> {
  const reviewer = castMember(people, 'reviewer');
  const password = demoPassword;
  for (const number of rejected.reworked) {
    await perform(reviewer, 'finding-dispositioned', (work) =>
      dispositionFinding(work, number, {
        decision: 'rework',
        reason: 'Blend the linear indication, then look again.',
        repeat: ['wall', 'penetrant'],
        password,
      }),
    );
  }
  const reworked = parts.T10416;
  if (reworked) {
    await inspect(castMember(people, 'inspector2'), reworked, 'T10416', 'wall', shop);
    await inspect(castMember(people, 'inspector2'), reworked, 'T10416', 'penetrant', shop, { picture: shop.pictures.blended });
  }
  for (const number of rejected.scrapped) {
    await perform(reviewer, 'finding-dispositioned', (work) =>
      dispositionFinding(work, number, {
        decision: 'scrap',
        reason: 'Two stations under the limit; no metal can be put back.',
        password,
      }),
    );
  }
  for (const number of rejected.referred) {
    await perform(reviewer, 'finding-dispositioned', (work) =>
      dispositionFinding(work, number, {
        decision: 'refer',
        reason: 'Handling dent on the platform edge; the customer is asked.',
        password,
      }),
    );
  }
}

async function release(context: DecisionContext, line: string, serials: readonly string[]): Promise<string> {
  const { people, orderLines } = context;
  const shipment = await perform(castMember(people, 'administrator'), 'shipment-created', (work) =>
    createShipment(work, { orderLine: orderLines[line] ?? '', serials: [...serials] }),
  );
  const signed = await perform(castMember(people, 'signatory'), 'release-signed', (work) => signRelease(work, shipment.number));
  const row = await selectOne<{ releaseId: string }>(
    reading(),
    'SELECT release_id AS releaseId FROM certificates WHERE number = ?',
    [signed.certificate],
  );
  await issue(row?.releaseId ?? '');
  await inTransaction(null, (work) =>
    execute(work, `UPDATE jobs SET state = 'done' WHERE unique_key = ?`, [`issue-${row?.releaseId ?? ''}`]),
  );
  return signed.certificate;
}

/** Dispositions, a gauge found out of tolerance, a held heat, two certificates of which one is withdrawn, and a shipment that waits for its signature. */
export async function seedDecisions(context: DecisionContext): Promise<void> {
  const { people, heats, orderLines } = context;
  await decide(context);
  await release(context, 'TARN AM-2210', ['T10407', 'T10408']);
  const later = await release(context, 'CORV AM-4402', ['G30101', 'G30102']);
  await perform(castMember(people, 'signatory'), 'certificate-withdrawn', (work) =>
    withdraw(work, later, {
      serials: ['G30102'],
      reason: 'Serial G30102 was dropped while it was packed.',
      password: demoPassword,
    }),
  );
  await perform(castMember(people, 'reviewer2'), 'hold-placed', (work) =>
    placeHold(work, {
      target: { kind: 'lot', id: heats['H-26-121'] ?? '' },
      reason: 'Oxygen of the heat is reported above its limit; the laboratory repeats the analysis.',
    }),
  );
  await perform(castMember(people, 'administrator'), 'shipment-created', (work) =>
    createShipment(work, { orderLine: orderLines['TARN AM-3175'] ?? '', serials: ['B20101', 'B20102', 'B20105'] }),
  );
  await findGaugeOut(people, context.shop.gauges);
}
