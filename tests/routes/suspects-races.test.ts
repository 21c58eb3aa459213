import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { inTransaction } from '@/db/work';
import { gauge, recordCheck } from './inspection-setting';
import {
  dropJob,
  finishedPart,
  freshPlan,
  partState,
  prepareFloor,
  rawPart,
  releaseAnswer,
  releasing,
  shipmentOf,
} from './release-setting';
import { bench, opened, saved, signing, wallContent } from './signing-setting';
import { calibrated, calibrating, checked, checking } from './suspects-setting';

beforeAll(prepareFloor);
beforeEach(freshPlan);
afterAll(closeDatabase);

const held = async (id: string) => (await partState(id))?.held;

/** A start a little later in each round, so that the two meet at every point of their ways. */
const late = (round: number) => new Promise((go) => setTimeout(go, round * 2));

describe('at the same instant as a release', () => {
  it('equipment found out of tolerance is seen, or the part is listed as gone: never neither', { timeout: 300_000 }, async () => {
    const outcomes = { seen: 0, listed: 0 };
    for (let round = 0; round < 20; round += 1) {
      bench.equipment = await gauge('ultrasonic-thickness', 'ut-gauge');
      const part = await finishedPart();
      const number = await shipmentOf([part.serial]);
      const [release, failure] = await Promise.all([releasing(number), late(round).then(() => calibrating(bench.equipment))]);
      expect(failure.status).toBe(201);
      const [item] = calibrated(failure).suspects?.items ?? [];
      if (release.status === 201) {
        const { certificate, job } = releaseAnswer(release);
        expect([item?.gone, item?.certificates[0]?.number]).toEqual([true, certificate]);
        await dropJob(job);
        outcomes.listed += 1;
      } else {
        expect([release.problem, item?.gone, (await partState(part.id))?.state]).toEqual(['gates-closed', false, 'finished']);
        outcomes.seen += 1;
      }
      expect(await held(part.id)).toBe(1);
    }
    expect(outcomes.seen + outcomes.listed).toBe(20);
  });

  it('a failed check is seen, or the part is listed as gone: never neither', { timeout: 300_000 }, async () => {
    for (let round = 0; round < 20; round += 1) {
      await inTransaction(null, (work) => recordCheck(work, bench.plan.line, 'good'));
      const part = await finishedPart();
      const number = await shipmentOf([part.serial]);
      const [release, failure] = await Promise.all([releasing(number), late(round).then(() => checking())]);
      expect(failure.status).toBe(201);
      const item = checked(failure).suspects?.items.find((one) => one.part.id === part.id);
      if (release.status === 201) {
        expect(item?.gone).toBe(true);
        await dropJob(releaseAnswer(release).job);
      } else expect([release.problem, item?.gone]).toEqual(['gates-closed', false]);
      await inTransaction(null, (work) => recordCheck(work, bench.plan.line, 'good'));
    }
  });

  it('as a signature, the act is listed, or the signature is refused: never neither', { timeout: 300_000 }, async () => {
    for (let round = 0; round < 20; round += 1) {
      bench.equipment = await gauge('ultrasonic-thickness', 'ut-gauge');
      const part = await rawPart();
      const draft = await saved(await opened('wall', part.id), await wallContent('0.90', '0.90'));
      const [signature, failure] = await Promise.all([signing(draft.id), late(round).then(() => calibrating(bench.equipment))]);
      expect(failure.status).toBe(201);
      const listed = calibrated(failure).suspects?.items.some((one) => one.part.id === part.id) ?? false;
      expect([signature.status === 201, listed, signature.status === 422]).toEqual([
        signature.status === 201,
        signature.status === 201,
        signature.status !== 201,
      ]);
    }
  });
});
