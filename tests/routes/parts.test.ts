import { beforeAll, describe, expect, it } from 'vitest';
import { GET as readLot } from '@/app/api/lots/[id]/route';
import { GET as lotParts } from '@/app/api/lots/[id]/parts/route';
import { POST as split } from '@/app/api/lots/[id]/split/route';
import { GET as lots, POST as createLot } from '@/app/api/lots/route';
import { GET as holds, POST as hold } from '@/app/api/holds/route';
import { POST as lift } from '@/app/api/holds/[id]/lift/route';
import { GET as readPart } from '@/app/api/parts/[id]/route';
import { GET as list, POST as create } from '@/app/api/parts/route';
import { GET as trace } from '@/app/api/trace/[partId]/route';
import { hold as holdShape, lot as lotShape, lotStory as lotStoryShape, part as partShape } from '@/services/contracts/parts';
import { call, partOf, person, setting, signingPassword, type Person, type Setting } from './inspection-setting';

let administrator: Person;
let reviewer: Person;
let plan: Setting;

beforeAll(async () => {
  administrator = await person('administrator');
  reviewer = await person('reviewer');
  plan = await setting(administrator);
});

let running = 0;
const fresh = (prefix: string) => `${prefix}-${plan.drawingId.slice(-8)}-${String((running += 1))}`;

async function madeLot(kind: string, parents: string[] = [], quantity = 12) {
  return lotShape.parse(
    (await call(createLot, { method: 'POST', as: administrator, body: { kind, number: fresh(kind), quantity, parents } })).json,
  );
}

describe('parts', () => {
  it('gets serials at the positions of a cluster, with the whole route open', async () => {
    const cluster = await madeLot('cluster');
    const serial = fresh('S');
    const made = await call(create, {
      method: 'POST',
      as: administrator,
      body: { plan: plan.planId, parts: [{ serial, cluster: cluster.number, position: '3' }] },
    });
    expect(made.status).toBe(201);
    const { items } = (await call(list, { as: administrator, query: `?serial=${serial}` })).json as {
      items: { id: string; ring: { state: string }[] }[];
    };
    expect(items).toHaveLength(1);
    expect(items[0]?.ring.map(({ state }) => state)).toEqual(['open', 'open']);
    const again = await call(create, {
      method: 'POST',
      as: administrator,
      body: { plan: plan.planId, parts: [{ serial, cluster: cluster.number, position: '3' }] },
    });
    expect([again.status, again.errors.map(({ path }) => path)]).toEqual([422, ['parts.0.serial', 'parts.0.position']]);
  });

  it('takes a percent sign in a search as itself', async () => {
    await partOf(plan, administrator);
    expect((await call(list, { as: administrator, query: '?serial=%25' })).json).toEqual({ items: [], next: null });
  });

  it('pages by key without losing or repeating a part', async () => {
    const cluster = await madeLot('cluster');
    const serials = Array.from({ length: 7 }, (_, place) => fresh(`P${String(place)}`)).sort();
    await call(create, {
      method: 'POST',
      as: administrator,
      body: {
        plan: plan.planId,
        parts: serials.map((serial, place) => ({ serial, cluster: cluster.id, position: String(place) })),
      },
    });
    const seen: string[] = [];
    let after = '';
    do {
      const page = (await call(list, { as: administrator, query: `?cluster=${cluster.number}&limit=3${after}` })).json as {
        items: { serial: string }[];
        next: string | null;
      };
      seen.push(...page.items.map(({ serial }) => serial));
      after = page.next === null ? '' : `&after=${page.next}`;
    } while (after !== '');
    expect(seen).toEqual(serials);
  });

  it('pages backwards by serial as well', async () => {
    const cluster = await madeLot('cluster');
    const serials = Array.from({ length: 5 }, (_, place) => fresh(`B${String(place)}`)).sort();
    const made = await call(create, {
      method: 'POST',
      as: administrator,
      body: {
        plan: plan.planId,
        parts: serials.map((serial, place) => ({ serial, cluster: cluster.id, position: String(place) })),
      },
    });
    expect((made.json as { items: { serial: string }[] }).items.map(({ serial }) => serial)).toEqual(serials);
    const seen: string[] = [];
    let after = '';
    do {
      const query = `?cluster=${cluster.number}&sort=-serial&limit=2${after}`;
      const page = (await call(list, { as: administrator, query })).json as { items: { serial: string }[]; next: string | null };
      seen.push(...page.items.map(({ serial }) => serial));
      after = page.next === null ? '' : `&after=${page.next}`;
    } while (after !== '');
    expect(seen).toEqual([...serials].reverse());
  });

  it('counts what is below a heat, and how far it has come', async () => {
    const heat = await madeLot('heat');
    const cluster = await madeLot('cluster', [heat.id]);
    const body = {
      plan: plan.planId,
      parts: ['1', '2', '3'].map((position) => ({ serial: fresh('N'), cluster: cluster.id, position })),
    };
    await call(create, { method: 'POST', as: administrator, body });
    const told = lotStoryShape.parse((await call(readLot, { as: administrator, params: { id: heat.id } })).json);
    expect([told.partCount, told.progress]).toEqual([3, { open: 6 }]);
  });

  it.each(['inspector', 'auditor', 'customer-quality'] as const)('are not entered by the role %s', async (role) => {
    const as = await person(role);
    const body = { plan: plan.planId, parts: [{ serial: fresh('S'), cluster: 'C', position: '1' }] };
    expect((await call(create, { method: 'POST', as, body })).status).toBe(403);
    expect((await call(createLot, { method: 'POST', as, body: { kind: 'heat', number: fresh('H'), quantity: 1 } })).status).toBe(
      403,
    );
  });

  it('are hidden from strangers and customers', async () => {
    const id = await partOf(plan, administrator);
    const customer = await person('customer-quality', plan.customerId);
    for (const [handler, params] of [
      [list, {}],
      [readPart, { id }],
      [lots, {}],
      [readLot, { id }],
      [lotParts, { id }],
    ] as const) {
      expect((await call(handler, { params })).status).toBe(401);
      expect((await call(handler, { params, as: customer })).status).toBe(403);
    }
  });

  it('answers 404 for a part that does not exist and 422 for a key that is not ours', async () => {
    expect((await call(readPart, { as: administrator, params: { id: '01900000-0000-7000-8000-000000000001' } })).status).toBe(
      404,
    );
    expect((await call(readPart, { as: administrator, params: { id: 'nobody' } })).status).toBe(404);
    expect((await call(list, { as: administrator, query: '?after=zzz' })).status).toBe(422);
  });
});

describe('lots', () => {
  it('keeps where a lot came from, and answers everything downstream of a heat', async () => {
    const heat = await madeLot('heat');
    const cluster = await madeLot('cluster', [heat.id]);
    const serial = fresh('D');
    await call(create, {
      method: 'POST',
      as: administrator,
      body: { plan: plan.planId, parts: [{ serial, cluster: cluster.id, position: '1' }] },
    });
    const below = (await call(lotParts, { as: administrator, params: { id: heat.id } })).json as { items: { serial: string }[] };
    expect(below.items.map((one) => one.serial)).toEqual([serial]);
    const read = lotShape.parse((await call(readLot, { as: administrator, params: { id: heat.id } })).json);
    expect(read.children.map(({ id }) => id)).toEqual([cluster.id]);
  });

  it('splits with a remainder, and not without', async () => {
    const wax = await madeLot('wax', [], 10);
    const taken = await call(split, {
      method: 'POST',
      as: administrator,
      params: { id: wax.id },
      body: { number: fresh('W'), quantity: 4 },
    });
    expect(taken.status).toBe(201);
    expect(lotShape.parse((await call(readLot, { as: administrator, params: { id: wax.id } })).json).quantity).toBe(6);
    const whole = await call(split, {
      method: 'POST',
      as: administrator,
      params: { id: wax.id },
      body: { number: fresh('W'), quantity: 6 },
    });
    expect([whole.status, whole.errors[0]?.path]).toEqual([422, 'quantity']);
  });

  it('names parents that are not known and numbers that are taken', async () => {
    const unknown = await call(createLot, {
      method: 'POST',
      as: administrator,
      body: { kind: 'shell', number: fresh('X'), quantity: 1, parents: ['01900000-0000-7000-8000-000000000001'] },
    });
    expect([unknown.status, unknown.errors[0]?.path]).toEqual([422, 'parents.0']);
    const core = await madeLot('core');
    const twice = await call(createLot, {
      method: 'POST',
      as: administrator,
      body: { kind: 'core', number: core.number, quantity: 1 },
    });
    expect(twice.status).toBe(409);
    const page = (await call(lots, { as: administrator, query: `?kind=core&number=${core.number}` })).json as {
      items: unknown[];
    };
    expect(page.items).toHaveLength(1);
  });
});

describe('a hold', () => {
  it('on a heat holds everything downstream at once, and a part stays held while another hold reaches it', async () => {
    const heat = await madeLot('heat');
    const cluster = await madeLot('cluster', [heat.id]);
    const made = (
      await call(create, {
        method: 'POST',
        as: administrator,
        body: { plan: plan.planId, parts: [{ serial: fresh('H'), cluster: cluster.id, position: '1' }] },
      })
    ).json as { items: { id: string }[] };
    const id = made.items[0]?.id ?? '';
    const place = (target: { kind: string; id: string }) =>
      call(hold, { method: 'POST', as: reviewer, body: { target, reason: 'oxygen above its limit' } });
    const first = holdShape.parse((await place({ kind: 'lot', id: heat.id })).json);
    const second = holdShape.parse((await place({ kind: 'part', id })).json);
    const held = async () => partShape.parse((await call(readPart, { as: reviewer, params: { id } })).json).held;
    expect(await held()).toBe(true);
    const free = (one: string) =>
      call(lift, {
        method: 'POST',
        as: reviewer,
        params: { id: one },
        body: { reason: 'analysis repeated, within limits', password: signingPassword },
      });
    expect((await free(first.id)).status).toBe(200);
    expect(await held()).toBe(true);
    expect((await free(second.id)).status).toBe(200);
    expect(await held()).toBe(false);
    expect((await free(second.id)).status).toBe(409);
    const open = (await call(holds, { as: reviewer, query: '?open=true&limit=200' })).json as { items: { id: string }[] };
    expect(open.items.some((one) => one.id === first.id || one.id === second.id)).toBe(false);
  });

  it('is in the history of the part', async () => {
    const id = await partOf(plan, administrator);
    await call(hold, { method: 'POST', as: reviewer, body: { target: { kind: 'part', id }, reason: 'dropped on the floor' } });
    const told = (await call(trace, { as: reviewer, params: { partId: id } })).json as {
      events: { kind: string; actor: { name: string } | null }[];
    };
    expect(told.events.map(({ kind, actor }) => [kind, actor?.name])).toContainEqual(['hold-placed', reviewer.name]);
  });
});
