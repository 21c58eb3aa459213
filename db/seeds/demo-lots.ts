import type { z } from 'zod';
import type { lotKind } from '@/services/contracts/parts';
import type { Plan } from '@/services/contracts/plan-content';
import { newId } from '../identity';
import { insert, insertAll } from '../models/table';
import { appendEvent } from '../repositories/events';
import { lotParents, lots } from '../repositories/lots';
import { partRequirements, parts } from '../repositories/parts';
import { requirementsOfPlan } from '../repositories/plans';
import { execute, inTransaction, selectOne, sqlTimeOf, type Work } from '../work';
import { castMember, type Cast } from './demo-people';
import type { DemoPartNumber } from './pictures/part-forms';

type Kind = z.output<typeof lotKind>;

async function addLot(
  work: Work,
  kind: Kind,
  number: string,
  quantity: number,
  parents: readonly string[],
  attributes: Record<string, string>,
): Promise<string> {
  const id = newId();
  await insert(work, lots, {
    id,
    kind,
    number,
    quantity,
    attributes,
    version: 0,
    createdBy: work.actor?.id ?? id,
    createdAt: work.now,
  });
  await insertAll(
    work,
    lotParents,
    parents.map((parentId) => ({ lotId: id, parentId, fromAt: work.now })),
  );
  await appendEvent(work, { kind: 'lot-created', subject: { kind: 'lot', id }, details: { kind, number, quantity, parents } });
  return id;
}

interface ClusterStory {
  readonly number: string;
  readonly partNumber: DemoPartNumber;
  readonly heat: string;
  readonly first: string;
  readonly count: number;
}

/** Every cluster of the demo: its heat and the serials cut from it. */
export const clusters: readonly ClusterStory[] = [
  { number: 'K-2210-041', partNumber: 'AM-2210', heat: 'H-26-114', first: 'T10401', count: 12 },
  { number: 'K-2210-042', partNumber: 'AM-2210', heat: 'H-26-118', first: 'T10413', count: 12 },
  { number: 'K-3175-017', partNumber: 'AM-3175', heat: 'H-26-118', first: 'B20101', count: 12 },
  { number: 'K-4402-009', partNumber: 'AM-4402', heat: 'H-26-114', first: 'G30101', count: 4 },
  { number: 'K-4402-010', partNumber: 'AM-4402', heat: 'H-26-121', first: 'G30105', count: 4 },
];

export interface DemoPart {
  readonly id: string;
  readonly partNumber: DemoPartNumber;
  readonly planId: string;
}

export type DemoParts = Readonly<Record<string, DemoPart>>;

export interface Lots {
  readonly heats: Readonly<Record<string, string>>;
  readonly parts: DemoParts;
}

function serialsOf(story: ClusterStory): string[] {
  const letter = story.first.slice(0, 1);
  const from = Number(story.first.slice(1));
  return Array.from({ length: story.count }, (_, place) => `${letter}${String(from + place)}`);
}

async function cutOff(work: Work, story: ClusterStory, clusterId: string, plan: Plan): Promise<Record<string, DemoPart>> {
  const drawing = await selectOne<{ id: string; customerId: string }>(
    work,
    'SELECT id, customer_id AS customerId FROM drawings WHERE number = ?',
    [story.partNumber],
  );
  if (!drawing) throw new Error(`drawing ${story.partNumber} is missing`);
  const route = await requirementsOfPlan(work, plan.id);
  const found: Record<string, DemoPart> = {};
  for (const [place, serial] of serialsOf(story).entries()) {
    const id = newId();
    await insert(work, parts, {
      id,
      drawingId: drawing.id,
      serial,
      planIssueId: plan.id,
      customerId: drawing.customerId,
      clusterId,
      position: String(place + 1),
      state: 'serialised',
      held: false,
      metCount: 0,
      requirementCount: route.length,
      nextRequirement: route[0]?.title ?? null,
      openFindings: 0,
      releaseCycle: 0,
      version: 0,
      createdAt: work.now,
    });
    await insertAll(
      work,
      partRequirements,
      route.map(({ id: requirementId, position }) => ({
        partId: id,
        requirementId,
        position,
        state: 'open' as const,
        inspectionId: null,
        cycle: 1,
        reason: null,
      })),
    );
    await appendEvent(work, {
      kind: 'parts-created',
      subject: { kind: 'part', id },
      also: [{ kind: 'lot', id: clusterId }],
      details: { serial, cluster: story.number, position: String(place + 1), planIssue: plan.issue },
    });
    found[serial] = { id, partNumber: story.partNumber, planId: plan.id };
  }
  return found;
}

/** Heats, shells, cores, wax and clusters, and the serials cut from them. */
export async function seedLots(people: Cast, plans: Readonly<Record<DemoPartNumber, Plan>>): Promise<Lots> {
  return inTransaction(castMember(people, 'administrator'), async (work) => {
    const heats: Record<string, string> = {};
    for (const [number, melt] of [
      ['H-26-114', 'A-7731'],
      ['H-26-118', 'A-7731'],
      ['H-26-121', 'A-7740'],
    ] as const) {
      heats[number] = await addLot(work, 'heat', number, 60, [], {
        alloy: 'nickel, directionally solidified',
        alloyCertificate: `${melt}-3.1`,
        pourTemperature: '1495 °C',
      });
    }
    const shell = await addLot(work, 'shell', 'S-26-090', 40, [], { slurryBatch: 'SL-330', coats: '8' });
    const core = await addLot(work, 'core', 'CO-26-071', 200, [], { ceramicBatch: 'SI-88', firing: 'run F-204' });
    const wax = await addLot(work, 'wax', 'W-26-155', 200, [core], { waxBatch: 'WX-12' });
    const found: Record<string, DemoPart> = {};
    for (const story of clusters) {
      const clusterId = await addLot(work, 'cluster', story.number, story.count, [heats[story.heat] ?? '', shell, wax], {
        positions: String(story.count),
      });
      Object.assign(found, await cutOff(work, story, clusterId, plans[story.partNumber]));
    }
    return { heats, parts: found };
  });
}

/** What the two customers ordered; answers order-line ids by customer code and part number. */
/** What the two customers want printed on their certificates. */
const statements = {
  TARN: [{ code: 'TT-Q 4.2', text: 'The parts were cast, inspected and packed at the address above.' }],
  CORV: [{ code: 'CR-07', text: 'Aucune reprise par soudage n’a été faite.' }],
};

export async function seedOrders(customerIds: Readonly<Record<'TARN' | 'CORV', string>>): Promise<Record<string, string>> {
  return inTransaction(null, async (work) => {
    const year = work.now.slice(0, 4);
    const at = sqlTimeOf(work.now);
    const found: Record<string, string> = {};
    const orders = [
      [
        'TARN',
        `O-${year}-00001`,
        'TT-58812',
        [
          ['AM-2210', 20],
          ['AM-3175', 12],
        ],
      ],
      ['CORV', `O-${year}-00002`, 'CR-2090-B', [['AM-4402', 8]]],
    ] as const;
    for (const [customer, number, purchaseOrder, lines] of orders) {
      const orderId = newId();
      await execute(work, 'INSERT INTO orders (id, number, customer_id, purchase_order, created_at) VALUES (?, ?, ?, ?, ?)', [
        orderId,
        number,
        customerIds[customer],
        purchaseOrder,
        at,
      ]);
      for (const [place, [partNumber, quantity]] of lines.entries()) {
        const lineId = newId();
        await execute(
          work,
          `INSERT INTO order_lines (id, order_id, line, drawing_revision_id, quantity, due_on, clauses)
           SELECT ?, ?, ?, r.id, ?, DATE(?) + INTERVAL 10 DAY, ? FROM drawing_revisions r JOIN drawings d ON d.id = r.drawing_id WHERE d.number = ?`,
          [
            lineId,
            orderId,
            (place + 1) * 10,
            quantity,
            at,
            JSON.stringify({ images: customer === 'TARN', values: true, statements: statements[customer] }),
            partNumber,
          ],
        );
        found[`${customer} ${partNumber}`] = lineId;
      }
    }
    // The running number goes on after the orders entered here.
    await execute(
      work,
      `INSERT INTO counters (name, year, value) VALUES ('O', ?, 2) ON DUPLICATE KEY UPDATE value = GREATEST(value, 2)`,
      [Number(year)],
    );
    return found;
  });
}
