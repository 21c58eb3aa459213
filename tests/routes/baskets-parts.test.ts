import { beforeAll, describe, expect, it } from 'vitest';
import { POST as closing } from '@/app/api/baskets/[id]/closing/route';
import { POST as removal } from '@/app/api/baskets/[id]/parts/[part]/removal/route';
import { PATCH as change } from '@/app/api/baskets/[id]/route';
import { POST as split } from '@/app/api/baskets/[id]/split/route';
import { POST as signAlone } from '@/app/api/inspections/[id]/signature/route';
import { newId } from '@/db/identity';
import { reading, select } from '@/db/work';
import { readHoldTags } from '@/services/baskets/hold-tags';
import { basket, signBasket } from '@/services/contracts/baskets';
import {
  filled,
  freshParts,
  marked,
  openedBasket,
  prepareShop,
  reread,
  scanInto,
  shop,
  signWith,
  states,
} from './basket-setting';
import { call, person, signingPassword } from './inspection-setting';

beforeAll(prepareShop);

describe('a part that is not clean', () => {
  it('is judged in the list, rejected by the one signature, and opens its finding', async () => {
    const { id, parts } = await filled(2);
    const inspection = await marked(id, parts[0]?.id ?? '');
    const row = (await reread(id)).parts.find((one) => one.inspection === inspection);
    expect([row?.mark, row?.verdict]).toEqual(['marked', 'reject']);
    const signed = signBasket.response.parse((await signWith(id, 2)).json);
    const rejected = signed.inspections.find((one) => one.inspection === inspection);
    expect([rejected?.verdict, rejected?.findings.length]).toEqual(['reject', 1]);
    expect((await states(parts[0]?.id ?? ''))[1]?.state).toBe('rejected');
    const tags = (await readHoldTags(id))?.tags ?? [];
    expect(tags.map(({ serial, verdict, findings }) => [serial, verdict, findings])).toEqual([
      [parts[0]?.serial, 'reject', rejected?.findings[0]?.number],
    ]);
    expect(await readHoldTags(newId())).toBeUndefined();
  });

  it('may be signed at the bench by itself: it is out of the basket then, and the counts agree', async () => {
    const { id, parts } = await filled(3);
    const inspection = await marked(id, parts[1]?.id ?? '');
    const alone = await call(signAlone, {
      method: 'POST',
      as: shop.inspector,
      params: { id: inspection },
      body: { password: signingPassword },
    });
    expect(alone.status).toBe(201);
    const now = await reread(id);
    expect(now.counts).toEqual({ in: 3, scanned: 2, out: 1 });
    expect(now.parts.find((one) => one.inspection === inspection)?.mark).toBe('signed-apart');
    expect((await signWith(id, 2)).status).toBe(201);
  });

  it('is taken out with its reason; its draft is kept as given up, and it may come back', async () => {
    const { id, parts } = await filled(2);
    const part = parts[0]?.id ?? '';
    const taken = await call(removal, {
      method: 'POST',
      as: shop.inspector,
      params: { id, part },
      body: { reason: 'to be cleaned again' },
    });
    expect(basket.parse(taken.json).counts).toEqual({ in: 2, scanned: 1, out: 1 });
    expect((await states(part))[1]?.state).toBe('open');
    const nothing = await call(removal, { method: 'POST', as: shop.inspector, params: { id, part }, body: { reason: '' } });
    expect(nothing.errors[0]?.path).toBe('reason');
    expect((await scanInto(id, parts[0]?.serial ?? '')).status).toBe(201);
    expect((await reread(id)).counts).toEqual({ in: 2, scanned: 2, out: 0 });
    expect((await signWith(id, 2)).status).toBe(201);
  });
});

describe('the set-up', () => {
  it('is corrected once for all clean parts; a marked one keeps what the bench holds', async () => {
    const { id, parts } = await filled(2);
    await marked(id, parts[0]?.id ?? '');
    await call(change, {
      method: 'PATCH',
      as: shop.inspector,
      params: { id },
      body: { process: [{ number: 'P3', value: '31', unit: 'min' }] },
    });
    const rows = await select<{ content: string; part: string }>(
      reading(),
      'SELECT content, part_id AS part FROM inspection_drafts WHERE part_id IN (?)',
      [parts.map((one) => one.id)],
    );
    const dwell = (part: string | undefined) =>
      (JSON.parse(rows.find((row) => row.part === part)?.content ?? '{}') as { process: { value: string }[] }).process[0]?.value;
    expect([dwell(parts[0]?.id), dwell(parts[1]?.id)]).toEqual(['25', '31']);
    expect((await reread(id)).parts.map(({ mark }) => mark)).toEqual(['marked', 'clean']);
  });

  it('voids every part when a value is outside its window: signed as void, to be repeated', async () => {
    const { id } = await openedBasket(2, { process: [{ number: 'P3', value: '90', unit: 'min' }] });
    const parts = await freshParts(2);
    for (const { serial } of parts) await scanInto(id, serial);
    const signed = signBasket.response.parse((await signWith(id, 2)).json);
    expect(signed.inspections.map(({ verdict }) => verdict)).toEqual(['not-evaluable', 'not-evaluable']);
    expect((await states(parts[0]?.id ?? ''))[1]?.state).toBe('to-be-repeated');
  });
});

describe('a shift change', () => {
  it('leaves what was inspected with its evaluator and hands the rest on', async () => {
    const [{ id }, parts] = [await openedBasket(5), await freshParts(5)];
    for (const { serial } of parts.slice(0, 2)) await scanInto(id, serial);
    const answer = await call(split, { method: 'POST', as: shop.other, params: { id }, body: {} });
    expect(answer.status).toBe(201);
    const next = basket.parse(answer.json);
    expect([next.evaluator.id, next.counts.in, next.splitFrom?.id]).toEqual([shop.other.id, 3, id]);
    expect((await reread(id)).counts).toEqual({ in: 2, scanned: 2, out: 0 });
    expect((await signWith(id, 2)).status).toBe(201);
    for (const { serial } of parts.slice(2)) expect((await scanInto(next.id, serial, { as: shop.other })).status).toBe(201);
    expect((await signWith(next.id, 3, { as: shop.other })).status).toBe(201);
  });

  it('is refused for more parts than are left, to the evaluator themselves, and by a third person for another', async () => {
    const { id } = await openedBasket(2);
    const tooMany = await call(split, { method: 'POST', as: shop.other, params: { id }, body: { count: 3 } });
    expect([tooMany.status, tooMany.errors[0]?.path]).toEqual([422, 'count']);
    const own = await call(split, { method: 'POST', as: shop.inspector, params: { id }, body: {} });
    expect(own.errors[0]?.path).toBe('to');
    const third = await person('inspector');
    const meddling = await call(split, { method: 'POST', as: third, params: { id }, body: { to: shop.other.id } });
    expect(meddling.status).toBe(409);
  });
});

describe('giving a basket up', () => {
  it('gives up every draft and signs nothing', async () => {
    const { id, parts } = await filled(2);
    const answer = await call(closing, { method: 'POST', as: shop.inspector, params: { id }, body: { reason: 'wrong line' } });
    expect(basket.parse(answer.json).state).toBe('closed');
    expect((await states(parts[0]?.id ?? ''))[1]?.state).toBe('open');
    expect((await signWith(id, 2)).problem).toBe('state-refused');
    const again = await openedBasket(2);
    expect((await scanInto(again.id, parts[0]?.serial ?? '')).status).toBe(201);
  });
});
