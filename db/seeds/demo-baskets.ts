import { changeInspection } from '@/services/inspections/change-inspection';
import type { Actor } from '@/services/contracts/actor';
import { planContent, type Plan } from '@/services/contracts/plan-content';
import { openBasket } from '@/services/baskets/open-basket';
import { scanPart } from '@/services/baskets/scan-part';
import { signBasket } from '@/services/baskets/sign-basket';
import { createDrawing } from '@/services/drawings/create-drawing';
import { createLot } from '@/services/lots/keep-lots';
import { createParts } from '@/services/parts/create-parts';
import { draftPlan } from '@/services/plans/draft-plan';
import { approvePlan, checkPlan } from '@/services/plans/move-plan';
import { enterRun } from '@/services/runs/enter-run';
import { issueBadge } from '@/services/workstations/keep-workstations';
import { databaseNow } from '../work';
import { castMember, type Cast } from './demo-people';
import type { Gauges } from './demo-equipment';
import { perform } from './perform';

/** The part number the demo's baskets hold: its penetrant operation asks for no photograph of a clean part. */
export const basketPartNumber = 'AM-5120';

/** Serials cut for the baskets: the last forty wait for penetrant. */
export const basketSerials: readonly string[] = Array.from({ length: 64 }, (_, place) => `N${String(50101 + place)}`);

/** What is on the badges of the demo's inspectors. */
const badges = { inspector: 'BADGE-OAKHURST-01', inspector2: 'BADGE-FENWRIGHT-01' } as const;

/** The rows of a criteria list with these numbers or ids: a plan may hold nothing that no operation asks. */
function numbered(rows: unknown, wanted: readonly string[]): unknown[] {
  const named = (row: unknown) => (row as { number?: string; id?: string }).number ?? (row as { id?: string }).id ?? '';
  return Array.isArray(rows) ? rows.filter((row) => wanted.includes(named(row))) : [];
}

async function seedPlan(people: Cast, like: Plan): Promise<Plan> {
  const [administrator, checker, approver] = ['administrator', 'reviewer2', 'reviewer'].map((key) => castMember(people, key));
  if (!administrator || !checker || !approver) throw new Error('the cast is not complete');
  await perform(administrator, 'drawing-created', (work) =>
    createDrawing(work, { number: basketPartNumber, title: 'Nozzle segment', revision: 'A', customer: 'TARN' }),
  );
  const content = planContent.parse({
    views: like.views,
    criteria: {
      ...like.criteria,
      characteristics: [],
      attributes: numbered(like.criteria.attributes, ['40', '42']),
      indicationRules: numbered(like.criteria.indicationRules, ['N7']),
    },
    route: like.route
      .filter(({ key }) => key === 'visual' || key === 'penetrant' || key === 'marking')
      .map((row) => ({ ...row, evidence: [] })),
  });
  const draft = await perform(administrator, 'plan-drafted', (work) => draftPlan(work, basketPartNumber, content));
  await perform(checker, 'plan-checked', (work) => checkPlan(work, draft.id));
  return perform(approver, 'plan-approved', (work) => approvePlan(work, draft.id));
}

/** Four clusters of sixteen under one heat, and their serials. */
async function seedParts(people: Cast, plan: Plan, heat: string): Promise<void> {
  const administrator = castMember(people, 'administrator');
  const clusters = ['K-5120-021', 'K-5120-022', 'K-5120-023', 'K-5120-024'];
  for (const number of clusters)
    await perform(administrator, 'lot-created', (work) =>
      createLot(work, { kind: 'cluster', number, quantity: 16, parents: [heat], attributes: { positions: '16' } }),
    );
  const parts = basketSerials.map((serial, place) => ({
    serial,
    cluster: clusters[Math.floor(place / 16)] ?? '',
    position: String((place % 16) + 1),
  }));
  await perform(administrator, 'parts-created', (work) => createParts(work, { plan: plan.id, parts }));
}

const values = [
  { number: 'W1', value: '30', unit: 'min' },
  { number: 'W2', value: '210', unit: 'kPa' },
  { number: 'W3', value: '60', unit: '°C' },
  { number: 'W4', value: '1850', unit: 'µW/cm²' },
  { number: 'W5', value: '8', unit: 'lx' },
];

async function seedRun(people: Cast): Promise<string> {
  const processor = castMember(people, 'inspector2');
  const at = await databaseNow();
  const run = await perform(processor, 'run-entered', (work) =>
    enterRun(work, {
      kind: 'penetrant-load',
      technique: 'FP-210',
      line: 'line 1',
      process: values,
      acts: [{ kind: 'processed', person: processor.id, at, equipment: [], values: { batch: 'PM-26-033' } }],
      parts: [],
    }),
  );
  return run.id;
}

async function openFor(actor: Actor, gauges: Gauges, run: string, countIn: number): Promise<string> {
  const at = await databaseNow();
  const basket = await perform(actor, 'basket-opened', (work) =>
    openBasket(work, {
      partNumber: basketPartNumber,
      requirement: 'penetrant',
      line: 'booth 3',
      run,
      countIn,
      process: [],
      acts: [
        { kind: 'processed', person: actor.id, at, equipment: [], values: { line: 'line 1' } },
        { kind: 'evaluated', equipment: [gauges['UV-11'] ?? ''], values: {} },
      ],
    }),
  );
  return basket.id;
}

async function scanAll(actor: Actor, basketId: string, serials: readonly string[]): Promise<string[]> {
  const drafts: string[] = [];
  for (const scan of serials) {
    const { part } = await perform(actor, 'basket-part-scanned', (work) => scanPart(work, basketId, { scan }, 0));
    drafts.push(part.inspection);
  }
  return drafts;
}

const crack = {
  id: '1',
  type: 'crack',
  view: 'concave',
  shape: { kind: 'entered', length: 1800, width: 60, zone: 'B', basis: 'as-bled', apart: true },
};

/** A signed basket, one in work with a rejected part; badges for two inspectors. */
export async function seedBaskets(people: Cast, like: Plan, gauges: Gauges, heat: string): Promise<void> {
  const [first, second] = [castMember(people, 'inspector'), castMember(people, 'inspector2')];
  await seedParts(people, await seedPlan(people, like), heat);
  const run = await seedRun(people);
  const signed = await openFor(second, gauges, run, 8);
  await scanAll(second, signed, basketSerials.slice(0, 8));
  await perform(second, 'basket-signed', (work) => signBasket(work, signed, 8));
  const open = await openFor(first, gauges, run, 16);
  const [draft] = await scanAll(first, open, basketSerials.slice(8, 19));
  await perform(first, 'inspection-changed', (work) => changeInspection(work, draft ?? '', { indications: [crack] }, 1));
  const administrator = castMember(people, 'administrator');
  for (const [key, badge] of Object.entries(badges))
    await perform(administrator, 'badge-issued', (work) => issueBadge(work, castMember(people, key).id, badge));
}
