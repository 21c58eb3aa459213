import type { Actor } from '@/services/contracts/actor';
import type { InspectionPatch } from '@/services/contracts/inspection-content';
import { changeInspection } from '@/services/inspections/change-inspection';
import { linkEvidence } from '@/services/inspections/link-evidence';
import { openInspection } from '@/services/inspections/open-inspection';
import { signInspection } from '@/services/inspections/sign-inspection';
import { databaseNow } from '../work';
import { measuredWithOldGauge, type Gauges } from './demo-equipment';
import type { Pictures, Picture } from './demo-evidence';
import type { DemoPart } from './demo-lots';
import { stations } from './demo-plans';

import { perform } from './perform';

export type Key = 'wall' | 'visual' | 'penetrant' | 'radiograph' | 'mass' | 'marking';
export const wholeRoute: readonly Key[] = ['wall', 'visual', 'penetrant', 'radiograph', 'mass', 'marking'];

export interface Shop {
  readonly gauges: Gauges;
  readonly pictures: Pictures;
}

interface Story {
  /** Wall readings in mm, station by station; others are taken from a spread about nominal. */
  readonly walls?: readonly string[];
  readonly picture?: Picture;
  readonly indications?: NonNullable<InspectionPatch['indications']>;
  readonly process?: Readonly<Record<string, string>>;
  readonly attribute?: 'conforming' | 'nonconforming';
}

const usualProcess: Readonly<Record<string, readonly [string, string]>> = {
  P1: ['30', 'min'],
  P2: ['210', 'kPa'],
  P3: ['60', '°C'],
  P4: ['1850', 'µW/cm²'],
  P5: ['8', 'lx'],
};
const block = { '1.00': '1.01', '2.00': '2.00', '3.00': '2.99' };

/** A wall in mm that every decision rule of the plan accepts, different from station to station and serial to serial. */
function usualWall(serial: string, place: number): string {
  const spread = (Number(serial.slice(1)) * 7 + place * 13) % 12;
  return (0.84 + spread / 100).toFixed(3);
}

type Act = NonNullable<InspectionPatch['acts']>[number];

function act(
  kind: Act['kind'],
  actor: Actor,
  at: string,
  equipment: readonly (string | undefined)[] = [],
  values: Record<string, string> = {},
): Act {
  return { kind, person: actor.id, at, equipment: equipment.filter((one) => one !== undefined), values };
}

type Content = (actor: Actor, at: string, serial: string, shop: Shop, story: Story) => InspectionPatch;

const contents: Readonly<Record<Key, Content>> = {
  wall: (actor, at, serial, { gauges }, story) => ({
    readings: stations.map((characteristic, place) => ({
      characteristic,
      value: story.walls?.[place] ?? usualWall(serial, place),
      unit: 'mm',
      source: 'file' as const,
    })),
    acts: [
      act('block-check-before', actor, at, [gauges['SB-02']], block),
      act('measured', actor, at, [gauges[measuredWithOldGauge.includes(serial) ? 'UT-04' : 'UT-07']]),
      act('block-check-after', actor, at, [gauges['SB-02']], block),
    ],
    examined: true,
  }),
  visual: (actor, at, _serial, _shop, story) => ({
    attributes: [{ number: '40', result: story.attribute ?? 'conforming' }],
    acts: [act('evaluated', actor, at)],
    examined: true,
  }),
  penetrant: (actor, at, _serial, { gauges }, story) => ({
    process: Object.entries(usualProcess).map(([number, [value, unit]]) => ({
      number,
      value: story.process?.[number] ?? value,
      unit,
    })),
    indications: story.indications ?? [],
    acts: [
      act('processed', actor, at, [], { line: 'line 1', batch: 'PM-26-033' }),
      act('evaluated', actor, at, [gauges['UV-11']]),
    ],
    examined: true,
  }),
  radiograph: (actor, at, _serial, { gauges }, story) => ({
    attributes: [{ number: '41', result: story.attribute ?? 'conforming' }],
    indications: story.indications ?? [],
    acts: [
      act('exposed', actor, at, [gauges['DD-02'], gauges['XT-02']], {
        kV: '160',
        mA: '4',
        exposureS: '12',
        distanceMm: '900',
        indicatorSeen: 'W13',
      }),
      act('evaluated', actor, at),
    ],
    examined: true,
  }),
  mass: (actor, at, serial, { gauges }) => ({
    readings: [
      { characteristic: 'M1', value: (410 + (Number(serial.slice(1)) % 5)).toFixed(1), unit: 'g', source: 'typed' as const },
    ],
    acts: [act('measured', actor, at, [gauges['BA-01']])],
    examined: true,
  }),
  marking: (actor, at) => ({
    attributes: [{ number: '42', result: 'conforming' }],
    acts: [act('evaluated', actor, at)],
    examined: true,
  }),
};

/** Opens and fills the inspection of one requirement as the inspector would; answers the draft's id. */
export async function fill(
  actor: Actor,
  part: DemoPart,
  serial: string,
  key: Key,
  shop: Shop,
  story: Story = {},
): Promise<string> {
  const draft = await perform(actor, 'inspection-opened', (work) =>
    openInspection(work, { subject: { part: part.id }, requirement: key }),
  );
  const at = await databaseNow();
  const picture = story.picture ?? (key === 'penetrant' ? shop.pictures.photograph : shop.pictures.radiograph)[part.partNumber];
  const content = contents[key](actor, at, serial, shop, story);
  const indications = content.indications?.map((one) => ({ ...one, evidence: picture.id }));
  await perform(actor, 'inspection-changed', (work) =>
    changeInspection(work, draft.id, { ...content, ...(indications ? { indications } : {}) }, draft.version),
  );
  if (key === 'penetrant' || key === 'radiograph') {
    const role = key === 'penetrant' ? 'photograph' : 'radiograph';
    await perform(actor, 'evidence-linked', (work) => linkEvidence(work, draft.id, picture.id, { role, view: 'concave' }));
  }
  return draft.id;
}

/** Fills and signs; answers verdict and finding numbers. */
export async function inspect(actor: Actor, part: DemoPart, serial: string, key: Key, shop: Shop, story: Story = {}) {
  const draftId = await fill(actor, part, serial, key, shop, story);
  return perform(actor, 'inspection-signed', (work) => signInspection(work, draftId, null));
}
