import type { Actor } from '@/services/contracts/actor';
import type { Pictures, Picture } from './demo-evidence';
import { fill, inspect, wholeRoute, type Key, type Shop } from './demo-inspections';
import type { DemoPart, DemoParts } from './demo-lots';
import { castMember, type Cast } from './demo-people';
import { seedDecisions } from './demo-decisions';

/** Serials that have passed every inspection, by customer; the first ones wait for release, the last are released. */
export const finished = {
  TARN: ['T10401', 'T10402', 'T10403', 'T10404', 'T10405', 'T10406', 'T10407', 'T10408', 'T10409'],
  CORV: ['G30101', 'G30102'],
  bladesTARN: ['B20101', 'B20102', 'B20103'],
} as const;

function partOf(parts: DemoParts, serial: string): DemoPart {
  const part = parts[serial];
  if (!part) throw new Error(`the demo has no part ${serial}`);
  return part;
}

function marked(picture: Picture, note: string) {
  return picture.truth.map((flaw, place) => ({
    id: String(place + 1),
    type: flaw.type,
    view: flaw.view,
    shape: flaw.shape,
    note,
  }));
}

async function passAll(
  inspectors: readonly [Actor, Actor],
  part: DemoPart,
  serial: string,
  shop: Shop,
  keys: readonly Key[] = wholeRoute,
): Promise<void> {
  for (const [place, key] of keys.entries())
    await inspect(place % 2 === 0 ? inspectors[0] : inspectors[1], part, serial, key, shop);
}

async function partlyDone(inspectors: readonly [Actor, Actor], parts: DemoParts, shop: Shop): Promise<void> {
  const upTo: Readonly<Record<string, number>> = {
    T10414: 3,
    T10418: 1,
    T10419: 2,
    T10420: 4,
    B20104: 2,
    B20105: 3,
    B20106: 5,
    B20107: 1,
    G30103: 3,
  };
  for (const [serial, count] of Object.entries(upTo))
    await passAll(inspectors, partOf(parts, serial), serial, shop, wholeRoute.slice(0, count));
  // Drafts somebody left open.
  await fill(inspectors[0], partOf(parts, 'T10415'), 'T10415', 'wall', shop);
  await fill(inspectors[1], partOf(parts, 'B20108'), 'B20108', 'visual', shop);
}

export interface Rejected {
  readonly crack: readonly string[];
  readonly indeterminate: readonly string[];
  readonly reworked: readonly string[];
  readonly scrapped: readonly string[];
  readonly referred: readonly string[];
}

/** Parts on which something is not right; answers the finding numbers by what was seen. */
async function defects(inspectors: readonly [Actor, Actor], parts: DemoParts, shop: Shop, pictures: Pictures): Promise<Rejected> {
  const numbers = (signed: { readonly findings: readonly { readonly number: string }[] }) =>
    signed.findings.map(({ number }) => number);
  const [first, second] = inspectors;
  const crackMarks = { picture: pictures.crack, indications: marked(pictures.crack, 'linear, wiped once, returned') };
  await passAll(inspectors, partOf(parts, 'T10410'), 'T10410', shop, ['wall', 'visual']);
  const crack = numbers(await inspect(first, partOf(parts, 'T10410'), 'T10410', 'penetrant', shop, crackMarks));
  const nearLimit = ['0.912', '0.905', '0.761', '0.884', '0.902', '0.921', '0.871', '0.889'];
  const indeterminate = numbers(await inspect(second, partOf(parts, 'T10411'), 'T10411', 'wall', shop, { walls: nearLimit }));
  await inspect(second, partOf(parts, 'T10416'), 'T10416', 'wall', shop);
  const reworked = numbers(await inspect(first, partOf(parts, 'T10416'), 'T10416', 'penetrant', shop, crackMarks));
  const thin = ['0.912', '0.705', '0.698', '0.884', '0.902', '0.921', '0.871', '0.889'];
  const scrapped = numbers(await inspect(second, partOf(parts, 'T10412'), 'T10412', 'wall', shop, { walls: thin }));
  // Rinse pressure above its window: the inspection is void, the part is not rejected.
  await inspect(first, partOf(parts, 'T10417'), 'T10417', 'penetrant', shop, { process: { P2: '310' } });
  const referred = numbers(
    await inspect(second, partOf(parts, 'B20109'), 'B20109', 'visual', shop, { attribute: 'nonconforming' }),
  );
  await inspect(first, partOf(parts, 'T10421'), 'T10421', 'radiograph', shop, {
    picture: pictures.pores,
    indications: marked(pictures.pores, 'rounded, well apart'),
  });
  return { crack, indeterminate, reworked, scrapped, referred };
}

/** Everything that happened in the demo before today's shift, through the product's own use-cases. */
export async function seedStory(
  people: Cast,
  parts: DemoParts,
  shop: Shop,
  context: { readonly orderLines: Readonly<Record<string, string>>; readonly heats: Readonly<Record<string, string>> },
): Promise<void> {
  const inspectors = [castMember(people, 'inspector'), castMember(people, 'inspector2')] as const;
  for (const serial of [...finished.TARN, ...finished.CORV, ...finished.bladesTARN])
    await passAll(inspectors, partOf(parts, serial), serial, shop);
  await partlyDone(inspectors, parts, shop);
  const rejected = await defects(inspectors, parts, shop, shop.pictures);
  await seedDecisions({ people, parts, shop, rejected, ...context });
}
