import { createHash } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { POST as signBasketRoute } from '@/app/api/baskets/[id]/signature/route';
import { PUT as giveBadge } from '@/app/api/people/[id]/badge/route';
import { POST as signIn } from '@/app/api/session/route';
import { GET as session } from '@/app/api/session/route';
import { POST as badgeIn } from '@/app/api/sittings/route';
import { POST as retire } from '@/app/api/workstations/[id]/retirement/route';
import { GET as here } from '@/app/api/workstations/here/route';
import { GET as list, POST as register } from '@/app/api/workstations/route';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, selectOne } from '@/db/work';
import { listWorkstations, readHere, registerWorkstation } from '@/services/contracts/workstations';
import { freshParts, openedBasket, prepareShop, scanInto, shop } from './basket-setting';
import { call, person, signingPassword, type Answer, type Person } from './inspection-setting';

// The people of the setting have this word as password and as PIN.
const pin = signingPassword;

let administrator: Person;

beforeAll(async () => {
  await prepareShop();
  administrator = await person('administrator');
});

interface Station {
  readonly id: string;
  readonly name: string;
  readonly cookie: string;
}

async function station(): Promise<Station> {
  const name = `Booth ${newId().slice(-8)}`;
  const answer = await call(register, { method: 'POST', as: administrator, body: { name, scanPrefix: 'F8' } });
  expect(answer.status).toBe(201);
  const { id } = registerWorkstation.response.parse(answer.json);
  return { id, name, cookie: (answer.headers.get('set-cookie') ?? '').split(';')[0] ?? '' };
}

async function badgeOf(who: Person): Promise<string> {
  const badge = `BADGE-${newId()}`;
  const answer = await call(giveBadge, { method: 'PUT', as: administrator, params: { id: who.id }, body: { badge } });
  expect(answer.status).toBe(204);
  return badge;
}

const at = (cookie: string): Person => ({ id: '', name: '', cookie });

function badging(place: Station | null, body: object, more = ''): Promise<Answer> {
  return call(badgeIn, { method: 'POST', as: at([place?.cookie ?? '', more].filter(Boolean).join('; ')), body });
}

/** The person as they go on with the cookie of the answer, at the same workstation. */
function seated(answer: Answer, who: Person, place: Station): Person {
  return { ...who, cookie: `${(answer.headers.get('set-cookie') ?? '').split(';')[0] ?? ''}; ${place.cookie}` };
}

function sessionDigest(who: Person): string {
  const value = /ringtrue-session=([^;]+)/.exec(who.cookie)?.[1] ?? '';
  return createHash('sha256').update(value).digest('hex');
}

/** Puts the last act of a sitting so many seconds into the past, as the database's clock would. */
async function idleFor(who: Person, seconds: number): Promise<void> {
  const moved = await inTransaction(null, (work) =>
    execute(work, 'UPDATE sittings SET last_act_at = UTC_TIMESTAMP(6) - INTERVAL ? SECOND WHERE session_id = ?', [
      seconds,
      sessionDigest(who),
    ]),
  );
  expect(moved).toBe(1);
}

async function onePartBasket(as: Person): Promise<string> {
  const [{ id }, [part]] = [await openedBasket(1), await freshParts(1)];
  expect((await scanInto(id, part?.serial ?? '', { as })).status).toBe(201);
  return id;
}

function signing(as: Person, id: string, body: object): Promise<Answer> {
  return call(signBasketRoute, { method: 'POST', as, params: { id }, body: { count: 1, ...body } });
}

describe('workstations', () => {
  it('are registered by an administrator alone, each name once', async () => {
    const body = { name: `Bench ${newId().slice(-8)}` };
    expect((await call(register, { method: 'POST', body })).status).toBe(401);
    expect((await call(register, { method: 'POST', as: shop.inspector, body })).status).toBe(403);
    expect((await call(register, { method: 'POST', as: administrator, body })).status).toBe(201);
    const again = await call(register, { method: 'POST', as: administrator, body });
    expect([again.problem, again.errors[0]?.path]).toEqual(['already-exists', 'name']);
    const wrong = await call(register, { method: 'POST', as: administrator, body: { name: '', scanPrefix: '~' } });
    expect(wrong.errors.map(({ path }) => path).sort()).toEqual(['name', 'scanPrefix']);
  });

  it('tell the browser its scanner prefix and how the sitting stands', async () => {
    const place = await station();
    const known = await call(here, { as: at(`${shop.inspector.cookie}; ${place.cookie}`) });
    expect(readHere.response.parse(known.json)).toMatchObject({
      workstation: { name: place.name },
      scanPrefix: 'F8',
      sitting: { state: 'open' },
    });
    const elsewhere = readHere.response.parse((await call(here, { as: shop.inspector })).json);
    expect([elsewhere.workstation, elsewhere.scanPrefix]).toEqual([null, 'F9']);
  });

  it('keep no token in the database that would open one', async () => {
    const place = await station();
    const token = place.cookie.split('=')[1] ?? '';
    const row = await selectOne<{ digest: string }>(reading(), 'SELECT token_digest AS digest FROM workstations WHERE id = ?', [
      place.id,
    ]);
    expect(row?.digest).not.toBe(token);
    expect(row?.digest).toBe(createHash('sha256').update(token).digest('hex'));
  });

  it('are nobody’s place once retired', async () => {
    const place = await station();
    const badge = await badgeOf(shop.inspector);
    const seatedThere = seated(await badging(place, { badge, pin }), shop.inspector, place);
    expect((await call(session, { as: seatedThere })).status).toBe(200);
    expect((await call(retire, { method: 'POST', as: shop.inspector, params: { id: place.id }, body: {} })).status).toBe(403);
    expect((await call(retire, { method: 'POST', as: administrator, params: { id: newId() }, body: {} })).status).toBe(404);
    expect((await call(retire, { method: 'POST', as: administrator, params: { id: place.id }, body: {} })).status).toBe(200);
    expect((await call(session, { as: seatedThere })).status).toBe(401);
    expect((await badging(place, { badge, pin })).problem).toBe('not-permitted');
  });
});

describe('a badge', () => {
  it('opens a session at a registered workstation with the PIN, and nowhere else', async () => {
    const [place, badge] = [await station(), await badgeOf(shop.inspector)];
    expect((await badging(null, { badge, pin })).problem).toBe('not-permitted');
    const answer = await badging(place, { badge, pin });
    expect(answer.status).toBe(201);
    const now = seated(answer, shop.inspector, place);
    expect((await call(session, { as: now })).json).toMatchObject({ user: { name: shop.inspector.name } });
    const rows = listWorkstations.response.parse((await call(list, { as: shop.auditor })).json).items;
    expect(rows.find(({ id }) => id === place.id)?.sitting?.name).toBe(shop.inspector.name);
  });

  it('may be the e-mail instead', async () => {
    const place = await station();
    const answer = await badging(place, { email: `${shop.other.id}@aldermoor.example`, pin });
    expect(answer.status).toBe(201);
    const both = await badging(place, { email: 'a@b.example', badge: 'BADGE-1', pin });
    expect([both.status, both.errors[0]?.path]).toEqual([422, 'badge']);
  });

  it('answers the same for an unknown badge, a wrong PIN and a badge that was replaced', async () => {
    const place = await station();
    const old = await badgeOf(shop.other);
    const badge = await badgeOf(shop.other);
    const answers = [
      await badging(place, { badge: 'BADGE-nobody-has-this', pin }),
      await badging(place, { badge, pin: '000000' }),
      await badging(place, { badge: old, pin }),
    ];
    expect(answers.map(({ status, detail }) => [status, detail])).toEqual(Array(3).fill([401, answers[0]?.detail]));
    expect((await badging(place, { badge, pin })).status).toBe(201);
  });

  it('is locked by five wrong PINs, also sent all at once, until the password is used', async () => {
    const [place, who] = [await station(), await person('inspector')];
    const badge = await badgeOf(who);
    await Promise.all(Array.from({ length: 8 }, () => badging(place, { badge, pin: '111111' })));
    expect((await badging(place, { badge, pin })).status).toBe(401);
    const failures = await selectOne<{ failures: number }>(
      reading(),
      'SELECT pin_failures AS failures FROM accounts WHERE id = ?',
      [who.id],
    );
    expect(failures?.failures).toBe(5);
  });

  it('is given by an administrator, to one person at a time', async () => {
    const badge = await badgeOf(shop.inspector);
    const refused = await call(giveBadge, {
      method: 'PUT',
      as: shop.inspector,
      params: { id: shop.inspector.id },
      body: { badge },
    });
    expect(refused.status).toBe(403);
    const taken = await call(giveBadge, { method: 'PUT', as: administrator, params: { id: shop.other.id }, body: { badge } });
    expect([taken.problem, taken.errors[0]?.path]).toEqual(['already-exists', 'badge']);
    const short = await call(giveBadge, {
      method: 'PUT',
      as: administrator,
      params: { id: shop.other.id },
      body: { badge: 'x' },
    });
    expect(short.errors[0]?.path).toBe('badge');
    expect(
      (await call(giveBadge, { method: 'PUT', as: administrator, params: { id: newId() }, body: { badge: `BADGE-${newId()}` } }))
        .status,
    ).toBe(404);
  });
});

describe('a sitting', () => {
  it('takes the PIN after badge and PIN opened it', async () => {
    const [place, badge] = [await station(), await badgeOf(shop.inspector)];
    const now = seated(await badging(place, { badge, pin }), shop.inspector, place);
    const id = await onePartBasket(now);
    expect((await signing(now, id, { pin })).status).toBe(201);
  });

  it('takes no PIN after five idle minutes; the password brings it back, and then the PIN counts again', async () => {
    const id = await onePartBasket(shop.inspector);
    await idleFor(shop.inspector, 301);
    const refused = await signing(shop.inspector, id, { pin });
    expect([refused.problem, refused.errors[0]?.path, (refused.json as { why?: string }).why]).toEqual([
      'signature-refused',
      'pin',
      'sitting-ended',
    ]);
    const standing = readHere.response.parse((await call(here, { as: shop.inspector })).json);
    expect(standing.sitting.state).toBe('idle');
    expect((await signing(shop.inspector, id, { password: signingPassword })).status).toBe(201);
    const next = await onePartBasket(shop.inspector);
    expect((await signing(shop.inspector, next, { pin })).status).toBe(201);
  });

  it('goes on while the person works: each scan counts as work', async () => {
    const [{ id }, [part]] = [await openedBasket(1), await freshParts(1)];
    await idleFor(shop.inspector, 290);
    expect((await scanInto(id, part?.serial ?? '')).status).toBe(201);
    const row = await selectOne<{ idle: number }>(
      reading(),
      'SELECT TIMESTAMPDIFF(SECOND, last_act_at, UTC_TIMESTAMP(6)) AS idle FROM sittings WHERE session_id = ?',
      [sessionDigest(shop.inspector)],
    );
    expect(row?.idle).toBeLessThan(30);
    expect((await signing(shop.inspector, id, { pin })).status).toBe(201);
  });

  it('is not brought back by work after it has run out', async () => {
    const [{ id }, [part]] = [await openedBasket(1), await freshParts(1)];
    await idleFor(shop.inspector, 400);
    await scanInto(id, part?.serial ?? '');
    expect((await signing(shop.inspector, id, { pin })).problem).toBe('signature-refused');
    expect((await signing(shop.inspector, id, { password: signingPassword })).status).toBe(201);
  });

  it('ends when another person badges in, within two seconds, and each finds their basket as it was', async () => {
    const place = await station();
    const badges = [await badgeOf(shop.inspector), await badgeOf(shop.other)];
    const first = seated(await badging(place, { badge: badges[0], pin }), shop.inspector, place);
    const id = await onePartBasket(first);
    const began = performance.now();
    const second = seated(await badging(place, { badge: badges[1], pin }), shop.other, place);
    expect(performance.now() - began).toBeLessThan(2000);
    expect((await call(session, { as: first })).status).toBe(401);
    expect((await signing(second, id, { pin })).problem).toBe('state-refused');
    const back = seated(await badging(place, { badge: badges[0], pin }), shop.inspector, place);
    expect((await call(session, { as: second })).status).toBe(401);
    expect((await signing(back, id, { pin })).status).toBe(201);
  });

  it('ends at a workstation when another person signs in there by password', async () => {
    const [place, badge] = [await station(), await badgeOf(shop.inspector)];
    const first = seated(await badging(place, { badge, pin }), shop.inspector, place);
    const answer = await call(signIn, {
      method: 'POST',
      as: at(place.cookie),
      body: { email: `${shop.other.id}@aldermoor.example`, password: signingPassword },
    });
    expect(answer.status).toBe(204);
    expect((await call(session, { as: first })).status).toBe(401);
  });

  it('leaves one person at a workstation when six badge in at once', async () => {
    const place = await station();
    const people = await Promise.all(Array.from({ length: 6 }, () => person('inspector')));
    const badges = await Promise.all(people.map(badgeOf));
    await Promise.all(badges.map((badge) => badging(place, { badge, pin })));
    const row = await selectOne<{ open: number }>(
      reading(),
      'SELECT COUNT(*) AS open FROM sittings t JOIN sessions s ON s.id = t.session_id WHERE t.workstation_id = ? AND t.ended_at IS NULL',
      [place.id],
    );
    expect(row?.open).toBe(1);
  });
});
