import type { Actor } from '@/services/contracts/actor';
import { admitEvidence } from '@/services/inspections/admit-evidence';
import { receiveEvidence } from '@/services/inspections/receive-evidence';
import { castMember, type Cast } from './demo-people';
import { perform } from './perform';
import { dicondeFile } from './pictures/diconde-file';
import type { KnownFlaw } from './pictures/known-flaws';
import type { DemoPartNumber } from './pictures/part-forms';
import { penetrantPhotograph } from './pictures/penetrant';
import { photographJpeg } from './pictures/picture-files';
import { radiograph } from './pictures/radiograph';

async function admit(actor: Actor, kind: 'radiograph' | 'photograph', name: string, bytes: Buffer): Promise<string> {
  const query = { kind, name };
  const received = await receiveEvidence(
    query,
    new Request('http://seed.invalid/evidence', { method: 'POST', body: new Uint8Array(bytes) }),
  );
  return (await perform(actor, 'evidence-admitted', (work) => admitEvidence(work, query, received))).id;
}

export interface Picture {
  readonly id: string;
  /** What is in the picture, because we put it there. */
  readonly truth: readonly KnownFlaw[];
}

export interface Pictures {
  readonly photograph: Readonly<Record<DemoPartNumber, Picture>>;
  readonly radiograph: Readonly<Record<DemoPartNumber, Picture>>;
  readonly crack: Picture;
  readonly pores: Picture;
  readonly blended: Picture;
}

const pitchUm = 100;

async function photograph(
  actor: Actor,
  partNumber: DemoPartNumber,
  serial: string,
  seed: number,
  indications: Parameters<typeof penetrantPhotograph>[0]['indications'],
): Promise<Picture> {
  const made = penetrantPhotograph({ partNumber, view: 'concave', serial, seed, pixelPitchUm: pitchUm, indications });
  return {
    id: await admit(actor, 'photograph', `${serial}-penetrant-concave.jpg`, await photographJpeg(made)),
    truth: made.truth,
  };
}

async function grey(
  actor: Actor,
  partNumber: DemoPartNumber,
  serial: string,
  seed: number,
  flaws: Parameters<typeof radiograph>[0]['flaws'],
): Promise<Picture> {
  const made = radiograph({ partNumber, view: 'concave', serial, seed, pixelPitchUm: pitchUm, flaws });
  const file = dicondeFile(made, {
    componentName: partNumber,
    componentId: serial,
    serial,
    company: 'Aldermoor Precision Castings',
    operator: 'cell 2',
    date: '20260302',
    time: '081500',
    tubeVoltageKv: '160',
    tubeCurrentMa: '4',
    exposureMs: 12000,
    sourceToDetectorMm: '900',
    viewName: 'concave',
  });
  return { id: await admit(actor, 'radiograph', `${serial}-radiograph-concave.dcm`, file), truth: made.truth };
}

/** Pictures whose truth is known, admitted as evidence through the product's own door. */
export async function seedPictures(people: Cast): Promise<Pictures> {
  const by = castMember(people, 'inspector');
  const clean = async (partNumber: DemoPartNumber, serial: string, seed: number) => photograph(by, partNumber, serial, seed, []);
  const crackLine = [
    [30000, 24000],
    [31200, 24600],
    [32500, 24800],
    [33800, 25500],
  ] as [number, number][];
  return {
    photograph: {
      'AM-2210': await clean('AM-2210', 'T10401', 11),
      'AM-3175': await clean('AM-3175', 'B20101', 12),
      'AM-4402': await clean('AM-4402', 'G30101', 13),
    },
    radiograph: {
      'AM-2210': await grey(by, 'AM-2210', 'T10401', 21, []),
      'AM-3175': await grey(by, 'AM-3175', 'B20101', 22, []),
      'AM-4402': await grey(by, 'AM-4402', 'G30101', 23, []),
    },
    crack: await photograph(by, 'AM-2210', 'T10410', 31, [
      { type: 'crack', shape: { kind: 'polyline', points: crackLine, width: 160 }, brightness: 0.95 },
    ]),
    pores: await grey(by, 'AM-2210', 'T10414', 41, [
      { type: 'gas-pore', center: [28000, 23000], diameterUm: 600 },
      { type: 'gas-pore', center: [36000, 26000], diameterUm: 450 },
    ]),
    blended: await photograph(by, 'AM-2210', 'T10416', 51, [
      { type: 'gas-pore', shape: { kind: 'circle', center: [30000, 26000], diameter: 420 }, brightness: 0.7 },
    ]),
  };
}
