import { beforeAll, describe, expect, it } from 'vitest';
import { GET as read, PATCH as change } from '@/app/api/baskets/[id]/route';
import { GET as list, POST as open } from '@/app/api/baskets/route';
import { GET as offer } from '@/app/api/baskets/set-up/route';
import { POST as placeHold } from '@/app/api/holds/route';
import { newId } from '@/db/identity';
import { signedInspectionById } from '@/db/repositories/inspections';
import { reading, select, selectOne } from '@/db/work';
import { listBaskets, scanPart, setUpBasket, signBasket } from '@/services/contracts/baskets';
import { page } from '@/services/contracts/common';
import { readRecord } from '@/services/inspections/signed-record';
import {
  filled,
  freshParts,
  openedBasket,
  prepareShop,
  reread,
  scanInto,
  setUp,
  shop,
  signWith,
  states,
  whyOf,
} from './basket-setting';
import { call, partOf, setting } from './inspection-setting';

beforeAll(prepareShop);

describe('opening a basket', () => {
  it('offers, from one scan, the operations of the part number and why some cannot be done by the basket', async () => {
    const [part] = await freshParts(1);
    const answer = await call(offer, { as: shop.inspector, query: `?scan=${part?.serial ?? ''}` });
    const offered = setUpBasket.response.parse(answer.json);
    expect(offered.partNumber).toBe(shop.partNumber);
    expect(offered.operations.map(({ key, refusal }) => [key, refusal === null])).toEqual([
      ['wall', false],
      ['fpi', true],
    ]);
    expect(offered.operations[1]?.windows).toEqual([
      { number: 'P3', title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '60' },
    ]);
    const unknown = await call(offer, { as: shop.inspector, query: '?scan=NOBODY-1' });
    expect([unknown.status, unknown.errors[0]?.path]).toEqual([422, 'scan']);
  });

  it('refuses an operation that asks readings of each part, an unknown one, and an unknown field', async () => {
    const wall = await call(open, { method: 'POST', as: shop.inspector, body: await setUp(4, { requirement: 'wall' }) });
    expect([wall.status, wall.errors[0]?.path]).toEqual([422, 'requirement']);
    const none = await call(open, { method: 'POST', as: shop.inspector, body: await setUp(4, { requirement: 'etch' }) });
    expect([none.status, none.errors[0]?.path]).toEqual([422, 'requirement']);
    const count = await call(open, { method: 'POST', as: shop.inspector, body: await setUp(0, { colour: 'green' }) });
    expect(count.errors.map(({ path }) => path).sort()).toEqual(['colour', 'countIn']);
  });

  it('refuses an operation that asks for a file of each part', async () => {
    const base = await setting(shop.inspector);
    const number = await selectOne<{ number: string }>(reading(), 'SELECT number FROM drawings WHERE id = ?', [base.drawingId]);
    const body = await setUp(3, { partNumber: number?.number ?? '' });
    const answer = await call(open, { method: 'POST', as: shop.inspector, body });
    expect([answer.status, answer.errors[0]?.message]).toEqual([422, expect.stringContaining('files of each part')]);
  });

  it('is refused to a stranger, to an auditor, and shows a stranger nothing', async () => {
    expect((await call(open, { method: 'POST', body: await setUp(3) })).status).toBe(401);
    expect((await call(open, { method: 'POST', as: shop.auditor, body: await setUp(3) })).status).toBe(403);
    expect((await call(read, { as: shop.inspector, params: { id: newId() } })).status).toBe(404);
  });

  it('says at once what stands against the set-up: a value outside its window voids all', async () => {
    const bad = await openedBasket(2, { process: [{ number: 'P3', value: '90', unit: 'min' }], acts: [] });
    expect(bad.setUp.void).toBe(true);
    expect(bad.setUp.faults.map(({ path }) => path)).toEqual(['acts.processed', 'acts.evaluated.equipment']);
  });

  it('is listed, newest first, and told to the journal', async () => {
    const opened = await openedBasket(3);
    const rows = page(listBaskets.response.shape.items.element).parse(
      (await call(list, { as: shop.inspector, query: '?limit=1&mine=true&state=open' })).json,
    );
    expect(rows.items[0]?.number).toBe(opened.number);
    expect(rows.next).not.toBeNull();
    const [event] = await select<{ kind: string }>(
      reading(),
      `SELECT kind FROM events WHERE subject_kind = 'basket' AND subject_id = ?`,
      [opened.id],
    );
    expect(event?.kind).toBe('basket-opened');
  });
});

describe('scanning', () => {
  it('counts one part once, however often and however simultaneously it is scanned', async () => {
    const [{ id }, [part]] = [await openedBasket(5), await freshParts(1)];
    const answers = await Promise.all(Array.from({ length: 50 }, () => scanInto(id, part?.serial ?? '')));
    const outcomes = answers.map(({ json }) => scanPart.response.parse(json).outcome);
    expect(outcomes.filter((one) => one === 'added')).toHaveLength(1);
    expect(outcomes.filter((one) => one === 'already')).toHaveLength(49);
    const now = await reread(id);
    expect([now.counts.scanned, now.parts.length]).toEqual([1, 1]);
    const drafts = await select(reading(), 'SELECT id FROM inspection_drafts WHERE part_id = ?', [part?.id]);
    expect(drafts).toHaveLength(1);
  });

  it('answers a repeated key with the first answer, and a key reused for another scan with a refusal', async () => {
    const [{ id }, [one, two]] = [await openedBasket(5), await freshParts(2)];
    const headers = { 'idempotency-key': newId() };
    const first = await scanInto(id, one?.serial ?? '', { headers });
    const again = await scanInto(id, one?.serial ?? '', { headers });
    expect([first.status, again.status, again.headers.get('idempotent-replay')]).toEqual([201, 201, 'true']);
    expect((await scanInto(id, two?.serial ?? '', { headers })).problem).toBe('key-reused');
    expect((await reread(id)).counts.scanned).toBe(1);
  });

  it('takes a scan that waited for the network at the time it was made, never before the basket was opened', async () => {
    const [opened, [one]] = [await openedBasket(5), await freshParts(1)];
    const answer = scanPart.response.parse(
      (await scanInto(opened.id, one?.serial ?? '', { headers: { 'scan-waited-ms': '3600000' } })).json,
    );
    expect(answer.part.scannedAt).toBe(opened.openedAt);
  });

  it('reads a part number before the serial, and a format 06 message', async () => {
    const [{ id }, [one, two, three]] = [await openedBasket(5), await freshParts(3)];
    expect((await scanInto(id, `${shop.partNumber} ${one?.serial ?? ''}`)).status).toBe(201);
    expect((await scanInto(id, `[)>\u001e06\u001d1P${shop.partNumber}\u001dS${two?.serial ?? ''}\u001e\u0004`)).status).toBe(201);
    const wrong = await scanInto(id, `SOMETHING-ELSE ${three?.serial ?? ''}`);
    expect([wrong.status, whyOf(wrong)]).toEqual([422, 'unknown']);
  });

  it('tells a wrong part number from an unknown serial', async () => {
    const { id } = await openedBasket(5);
    const otherPlan = await setting(shop.inspector);
    const strange = await partOf(otherPlan, shop.inspector);
    const row = await selectOne<{ serial: string }>(reading(), 'SELECT serial FROM parts WHERE id = ?', [strange]);
    const wrong = await scanInto(id, row?.serial ?? '');
    expect([wrong.status, whyOf(wrong), wrong.errors[0]?.path]).toEqual([409, 'wrong-part', 'scan']);
    const unknown = await scanInto(id, 'NO-SUCH-SERIAL');
    expect([unknown.status, whyOf(unknown)]).toEqual([422, 'unknown']);
    expect((await reread(id)).counts.scanned).toBe(0);
  });

  it('refuses a part that has met the operation, a held one, one at the bench and one in another basket', async () => {
    const { id: done, parts } = await filled(1);
    expect((await signWith(done, 1)).status).toBe(201);
    const { id } = await openedBasket(5);
    expect(whyOf(await scanInto(id, parts[0]?.serial ?? ''))).toBe('already-accepted');
    const heldId = await partOf(shop.plan, shop.inspector, 'serialised', true);
    const held = await selectOne<{ serial: string }>(reading(), 'SELECT serial FROM parts WHERE id = ?', [heldId]);
    expect(whyOf(await scanInto(id, held?.serial ?? ''))).toBe('held');
    const other = await filled(1);
    const elsewhere = await scanInto(id, other.parts[0]?.serial ?? '');
    expect([whyOf(elsewhere), elsewhere.detail]).toEqual(['elsewhere', expect.stringContaining('is in basket B-')]);
  });

  it('belongs to one evaluator', async () => {
    const [{ id }, [one]] = [await openedBasket(2), await freshParts(1)];
    const answer = await scanInto(id, one?.serial ?? '', { as: shop.other });
    expect([answer.status, whyOf(answer)]).toEqual([409, 'not-yours']);
    expect((await scanInto(id, one?.serial ?? '', { as: shop.auditor })).status).toBe(403);
  });
});

describe('one signature', () => {
  it('writes one accepted inspection per part, each with the sentence signed, and the basket’s own record', async () => {
    const { id, parts } = await filled(4);
    const before = await reread(id);
    const answer = await signWith(id, 4);
    expect([answer.status, answer.detail]).toEqual([201, '']);
    const signed = signBasket.response.parse(answer.json);
    expect(signed.sentence).toBe(before.sentence);
    expect(signed.inspections.map(({ serial, verdict }) => [serial, verdict])).toEqual(
      [...parts].map(({ serial }) => [serial, 'accept']),
    );
    for (const { inspection, serial } of signed.inspections) {
      const row = await signedInspectionById(reading(), inspection);
      expect(row?.sentence.startsWith(signed.sentence)).toBe(true);
      expect(row?.sentence).toContain(serial);
      expect(readRecord(row?.record ?? Buffer.from('')).content.examined).toBe(true);
    }
    for (const { id: part } of parts) expect((await states(part)).map(({ state }) => state)).toEqual(['open', 'met']);
    const now = await reread(id);
    expect([now.state, now.signed?.count, now.parts.every(({ mark }) => mark === 'signed')]).toEqual(['signed', 4, true]);
  });

  it('takes the time of each act from its scan', async () => {
    const { id, parts } = await filled(2);
    const scanned = (await reread(id)).parts.map(({ scannedAt }) => scannedAt);
    await signWith(id, 2);
    const rows = await select<{ at: string; part: string }>(
      reading(),
      `SELECT DATE_FORMAT(acted_at, '%Y-%m-%dT%H:%i:%s.%fZ') AS at, part_id AS part FROM inspections WHERE part_id IN (?)`,
      [parts.map(({ id: part }) => part)],
    );
    expect(parts.map(({ id: part }) => rows.find((row) => row.part === part)?.at)).toEqual(scanned);
  });

  it('refuses when the counts disagree, with each difference, and signs nothing', async () => {
    const { id } = await filled(3);
    const miscounted = await signWith(id, 4);
    expect([miscounted.status, miscounted.problem]).toEqual([422, 'not-signable']);
    expect(miscounted.errors.map(({ path }) => path)).toEqual(['count']);
    await call(change, { method: 'PATCH', as: shop.inspector, params: { id }, body: { countIn: 5 } });
    const short = await signWith(id, 3);
    expect(short.errors.map(({ path, message }) => [path, message])).toEqual([
      ['countIn', '5 were put in; 3 scanned and 0 out make 3'],
    ]);
    expect((await reread(id)).state).toBe('open');
  });

  it('names every reason of every part at once by serial: a part held between scan and signature stops all', async () => {
    const { id, parts } = await filled(3);
    const [first, , third] = parts;
    for (const one of [first, third])
      await call(placeHold, {
        method: 'POST',
        as: shop.inspector,
        body: { target: { kind: 'part', id: one?.id }, reason: 'dropped on the floor' },
      });
    const answer = await signWith(id, 3);
    expect([answer.status, answer.problem]).toEqual([422, 'not-signable']);
    expect(answer.errors.map(({ path }) => path).sort()).toEqual([first?.serial, third?.serial].sort());
    const signed = await select(reading(), 'SELECT id FROM inspections WHERE part_id IN (?)', [parts.map((one) => one.id)]);
    expect(signed).toHaveLength(0);
    expect((await reread(id)).parts.filter(({ held }) => held)).toHaveLength(2);
  });

  it('holds a basket to the reasons of a single signature: a lamp not named, on each part', async () => {
    const { id } = await openedBasket(2, { acts: [(await setUp(1)).acts].flat().slice(0, 1) });
    for (const { serial } of await freshParts(2)) await scanInto(id, serial);
    const answer = await signWith(id, 2);
    expect(answer.errors).toHaveLength(2);
    expect(
      answer.errors.every(({ path, message }) => path.endsWith('equipment') && message === 'the equipment used is needed'),
    ).toBe(true);
  });

  it('signs once when two signatures come at once', async () => {
    const { id, parts } = await filled(3);
    const both = await Promise.all([signWith(id, 3), signWith(id, 3)]);
    expect(both.map(({ status }) => status).sort()).toEqual([201, 409]);
    const rows = await select(reading(), 'SELECT id FROM inspections WHERE part_id IN (?)', [parts.map((one) => one.id)]);
    expect(rows).toHaveLength(3);
  });

  it('either holds the part or signs it when a hold and a signature come at once, never both unseen', async () => {
    for (let round = 0; round < 5; round += 1) {
      const { id, parts } = await filled(2);
      const [answer] = await Promise.all([
        signWith(id, 2),
        call(placeHold, {
          method: 'POST',
          as: shop.inspector,
          body: { target: { kind: 'part', id: parts[0]?.id }, reason: 'found mixed' },
        }),
      ]);
      const signedAt = await selectOne<{ signed: number }>(
        reading(),
        'SELECT COUNT(*) AS signed FROM inspections WHERE part_id IN (?)',
        [parts.map((one) => one.id)],
      );
      expect([201, 422]).toContain(answer.status);
      expect(signedAt?.signed).toBe(answer.status === 201 ? 2 : 0);
    }
  });

  it('refuses a wrong password, another evaluator and an auditor', async () => {
    const { id } = await filled(1);
    expect((await signWith(id, 1, { body: { password: 'not this one' } })).problem).toBe('signature-refused');
    expect((await signWith(id, 1, { as: shop.other })).problem).toBe('state-refused');
    expect((await signWith(id, 1, { as: shop.auditor })).status).toBe(403);
    expect((await reread(id)).state).toBe('open');
  });

  it('takes no scan after it', async () => {
    const { id } = await filled(1);
    await signWith(id, 1);
    const [late] = await freshParts(1);
    expect(whyOf(await scanInto(id, late?.serial ?? ''))).toBe('ended');
  });

  it('signs forty parts in one go, and says how long it took', async () => {
    const { id } = await filled(40);
    const began = performance.now();
    const answer = await signWith(id, 40);
    const took = performance.now() - began;
    console.info(`forty parts signed in ${took.toFixed(0)} ms`);
    expect(answer.status).toBe(201);
    expect(took).toBeLessThan(15_000);
  });
});
