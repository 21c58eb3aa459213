import { beforeAll, describe, expect, it } from 'vitest';
import { DELETE as revokeToken } from '@/app/api/machine-tokens/[id]/route';
import { GET as listTokens, POST as makeToken } from '@/app/api/machine-tokens/route';
import { PATCH as changePerson } from '@/app/api/people/[id]/route';
import { GET as listPeople, POST as createPerson } from '@/app/api/people/route';
import { GET as listParts } from '@/app/api/parts/route';
import { GET as listHolds } from '@/app/api/holds/route';
import { GET as readSession, POST as signIn } from '@/app/api/session/route';
import { newId } from '@/db/identity';
import { reading, select } from '@/db/work';
import { dayEnd } from '@/services/accounts/day-end';
import { createMachineToken, createPerson as createContract, listPeople as listContract } from '@/services/contracts/accounts';
import { call, person, setting, signingPassword, type Answer, type Person } from './inspection-setting';

const initialPassword = 'first-morning-in-the-shop';
const foreignId = '01900000-0000-7000-8000-000000000000';
let administrator: Person;
let customerId: string;

const freshEmail = () => `${newId()}@aldermoor.example`;
const creating = (body: object, as: Person = administrator): Promise<Answer> => call(createPerson, { method: 'POST', as, body });
const made = async (body: object) => createContract.response.parse((await creating(body)).json);
const changing = (id: string, version: number | null, body: object, as: Person = administrator): Promise<Answer> =>
  call(changePerson, {
    ...{ method: 'PATCH', as, params: { id }, body },
    headers: version === null ? {} : { 'if-match': `"${String(version)}"` },
  });
const entering = (email: string, password: string) =>
  call(signIn, { method: 'POST', body: { email, password }, headers: { 'x-forwarded-for': `203.0.113.${newId()}` } });

beforeAll(async () => {
  administrator = await person('administrator');
  customerId = (await setting(await person('reviewer'))).customerId;
});

describe('who keeps accounts and tokens', () => {
  it('is the administrator alone', async () => {
    for (const role of ['inspector', 'reviewer', 'auditor', 'customer-quality'] as const) {
      const other = await person(role);
      const answers = [
        await call(listPeople, { as: other }),
        await creating({}, other),
        await changing(administrator.id, 0, { disabled: true }, other),
        await call(listTokens, { as: other }),
        await call(makeToken, { method: 'POST', as: other, body: {} }),
        await call(revokeToken, { method: 'DELETE', as: other, params: { id: foreignId } }),
      ];
      expect(answers.map(({ status }) => status)).toEqual([403, 403, 403, 403, 403, 403]);
    }
    expect((await call(listPeople, {})).status).toBe(401);
  });
});

describe('a new account', () => {
  it('signs in with its initial password, whatever the case of the e-mail', async () => {
    const email = freshEmail();
    const answer = await creating({ email: email.toUpperCase(), name: 'Nadia Ferrow', role: 'inspector', initialPassword });
    expect(answer.status).toBe(201);
    expect(answer.json).toMatchObject({ email, name: 'Nadia Ferrow', role: 'inspector', disabledAt: null, lastSignInAt: null });
    expect(JSON.stringify(answer.json)).not.toMatch(/argon2/);
    expect((await entering(email, initialPassword)).status).toBe(204);
  });

  it('needs a customer, an end of access or neither, as its role has it; only reviewers get release authority', async () => {
    const base = { name: 'Nadia Ferrow', initialPassword };
    const paths = async (more: object) =>
      (await creating({ ...base, email: freshEmail(), ...more })).errors.map(({ path }) => path);
    expect(await paths({ role: 'customer-quality' })).toEqual(['customer']);
    expect(await paths({ role: 'customer-quality', customer: foreignId })).toEqual(['customer']);
    expect(await paths({ role: 'inspector', customer: customerId })).toEqual(['customer']);
    expect(await paths({ role: 'auditor' })).toEqual(['accessUntil']);
    expect(await paths({ role: 'inspector', releaseAuthority: true })).toEqual(['releaseAuthority']);
    expect(await paths({ role: 'keeper' })).toEqual(['role']);
    expect(await paths({ role: 'inspector', initialPassword: 'short' })).toEqual(['initialPassword']);
    expect(await paths({ role: 'inspector', email: 'no-address' })).toEqual(['email']);
    expect(await paths({ role: 'inspector', name: 'Na\u202edia' })).toEqual(['name']);
    const quality = await made({ ...base, email: freshEmail(), role: 'customer-quality', customer: customerId });
    expect(quality.customer?.id).toBe(customerId);
    const reviewer = await made({ ...base, email: freshEmail(), role: 'reviewer', releaseAuthority: true });
    expect(reviewer.releaseAuthority).toBe(true);
  });

  it('is refused for an e-mail that has one, naming the field', async () => {
    const body = { email: freshEmail(), name: 'Nadia Ferrow', role: 'inspector', initialPassword };
    await creating(body);
    const again = await creating(body);
    expect([again.status, again.problem, again.errors[0]?.path]).toEqual([409, 'already-exists', 'email']);
  });

  it('of an auditor ends with the last day at the plant', async () => {
    const day = '2031-07-14';
    const auditor = await made({ email: freshEmail(), name: 'Sol Wick', role: 'auditor', accessUntil: day, initialPassword });
    expect(auditor.accessUntil).toMatch(/^2031-07-1[45]T\d\d:00:00\.000000Z$/);
  });

  // Offsets of the IANA zones on these days, from memory: London +1 in summer, 0 in winter; clocks change 2026-03-29.
  it.each([
    ['2026-07-14', 'Europe/London', '2026-07-14T23:00:00.000000Z'],
    ['2026-01-14', 'Europe/London', '2026-01-15T00:00:00.000000Z'],
    ['2026-03-28', 'Europe/London', '2026-03-29T00:00:00.000000Z'],
    ['2026-03-29', 'Europe/London', '2026-03-29T23:00:00.000000Z'],
    ['2026-12-31', 'America/New_York', '2027-01-01T05:00:00.000000Z'],
    ['2026-06-01', 'Asia/Kolkata', '2026-06-01T18:30:00.000000Z'],
  ])('the day %s in %s ends at %s', (day, zone, instant) => {
    expect(dayEnd(day, zone)).toBe(instant);
  });
});

describe('changing an account', () => {
  it('that is disabled ends its sessions at once and refuses the next sign-in; enabled it signs in again', async () => {
    const email = freshEmail();
    const account = await made({ email, name: 'Nadia Ferrow', role: 'inspector', initialPassword });
    const cookie = (await entering(email, initialPassword)).headers.get('set-cookie')?.split(';')[0] ?? '';
    const theirs: Person = { id: account.id, name: account.name, cookie };
    expect((await call(readSession, { as: theirs })).status).toBe(200);
    const disabled = await changing(account.id, 0, { disabled: true });
    expect([disabled.status, disabled.headers.get('etag')]).toEqual([200, '"1"']);
    expect((await call(readSession, { as: theirs })).status).toBe(401);
    expect(await select(reading(), 'SELECT id FROM sessions WHERE user_id = ?', [account.id])).toEqual([]);
    expect((await entering(email, initialPassword)).status).toBe(401);
    expect((await changing(account.id, 1, { disabled: false })).status).toBe(200);
    expect((await call(readSession, { as: theirs })).status).toBe(401);
    expect((await entering(email, initialPassword)).status).toBe(204);
  });

  it('needs the version that was read', async () => {
    const account = await made({ email: freshEmail(), name: 'Nadia Ferrow', role: 'reviewer', initialPassword });
    expect((await changing(account.id, null, { releaseAuthority: true })).status).toBe(428);
    expect((await changing(account.id, 0, { releaseAuthority: true })).json).toMatchObject({
      releaseAuthority: true,
      version: 1,
    });
    expect((await changing(account.id, 0, { releaseAuthority: false })).problem).toBe('changed-meanwhile');
    expect((await changing(foreignId, 0, { disabled: true })).status).toBe(404);
  });

  it('gives release authority to reviewers only, and an auditor another end of access', async () => {
    const inspector = await made({ email: freshEmail(), name: 'Nadia Ferrow', role: 'inspector', initialPassword });
    expect((await changing(inspector.id, 0, { releaseAuthority: true })).errors[0]?.path).toBe('releaseAuthority');
    const auditor = await made({
      email: freshEmail(),
      name: 'Sol Wick',
      role: 'auditor',
      accessUntil: '2031-07-14',
      initialPassword,
    });
    const moved = await changing(auditor.id, 0, { accessUntil: '2032-01-20T12:00:00Z' });
    expect(moved.json).toMatchObject({ accessUntil: '2032-01-20T12:00:00.000000Z' });
  });

  it('sets a new initial password: sessions end, the PIN is gone, the journal does not hold it', async () => {
    const theirs = await person('inspector');
    const fresh = 'another-morning-in-the-shop';
    const answer = await changing(theirs.id, 0, { initialPassword: fresh });
    expect(answer.status).toBe(200);
    expect((await call(readSession, { as: theirs })).status).toBe(401);
    expect((await entering(`${theirs.id}@aldermoor.example`, signingPassword)).status).toBe(401);
    expect((await entering(`${theirs.id}@aldermoor.example`, fresh)).status).toBe(204);
    const stored = await select(reading(), 'SELECT pin_hash AS pin FROM accounts WHERE id = ?', [theirs.id]);
    expect(stored).toEqual([{ pin: null }]);
    const told = await select<{ body: Buffer }>(reading(), 'SELECT body FROM events WHERE subject_id = ?', [theirs.id]);
    for (const { body } of told) expect(body.toString('utf8')).not.toContain(fresh);
  });

  it('is not done to oneself by disabling or a new initial password', async () => {
    for (const body of [{ disabled: true }, { initialPassword: 'another-morning-in-the-shop' }]) {
      const answer = await changing(administrator.id, 0, body);
      expect([answer.status, answer.problem]).toEqual([403, 'not-permitted']);
    }
  });

  it('leaves one of two administrators who disable each other at once', async () => {
    const [one, two] = [await person('administrator'), await person('administrator')];
    const answers = await Promise.all([
      changing(two.id, 0, { disabled: true }, one),
      changing(one.id, 0, { disabled: true }, two),
    ]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 401]);
  });
});

describe('the list of people', () => {
  it('gives every account once over its pages', async () => {
    const seen: string[] = [];
    let after = '';
    for (let turn = 0; turn < 400; turn += 1) {
      const answer = await call(listPeople, { as: administrator, query: `?limit=50${after === '' ? '' : `&after=${after}`}` });
      const { items, next } = listContract.response.parse(answer.json);
      seen.push(...items.map(({ id }) => id));
      if (next === null) break;
      after = next;
    }
    expect(new Set(seen).size).toBe(seen.length);
    expect(seen).toContain(administrator.id);
    const [row] = await select<{ all: number }>(reading(), 'SELECT COUNT(*) AS `all` FROM accounts');
    expect(seen.length).toBeGreaterThan(10);
    expect(row?.all).toBeGreaterThanOrEqual(seen.length);
  });

  it('refuses a key that is none of ours', async () => {
    expect((await call(listPeople, { as: administrator, query: "?after=' OR 1=1" })).errors[0]?.path).toBe('after');
  });
});

describe('a machine token', () => {
  const bearer = (token: string) => ({ headers: { authorization: `Bearer ${token}` } });
  const making = async (calls: string[]) =>
    createMachineToken.response.parse(
      (await call(makeToken, { method: 'POST', as: administrator, body: { name: 'Measuring machine 2', calls } })).json,
    );

  it('makes the calls it names and no others, is stored as a hash, told once, and stops when revoked', async () => {
    const { id, token } = await making(['list-parts']);
    expect(token).toMatch(/^[A-Za-z0-9_-]{43}$/);
    expect((await call(listParts, bearer(token))).status).toBe(200);
    expect((await call(listHolds, bearer(token))).status).toBe(401);
    expect((await call(readSession, bearer(token))).status).toBe(401);
    const told = await call(listTokens, { as: administrator });
    expect(JSON.stringify(told.json)).toContain(id);
    expect(JSON.stringify(told.json)).not.toContain(token);
    const stored = await select<{ digest: string }>(reading(), 'SELECT token_digest AS digest FROM machine_tokens WHERE id = ?', [
      id,
    ]);
    expect(stored[0]?.digest).toMatch(/^[0-9a-f]{64}$/);
    expect((await call(revokeToken, { method: 'DELETE', as: administrator, params: { id } })).status).toBe(204);
    expect((await call(listParts, bearer(token))).status).toBe(401);
    expect((await call(revokeToken, { method: 'DELETE', as: administrator, params: { id } })).problem).toBe('state-refused');
    expect((await call(revokeToken, { method: 'DELETE', as: administrator, params: { id: foreignId } })).status).toBe(404);
  });

  it('ends with the account of who made it', async () => {
    const maker = await person('administrator');
    const answer = await call(makeToken, { method: 'POST', as: maker, body: { name: 'Robot', calls: ['list-parts'] } });
    const { token } = createMachineToken.response.parse(answer.json);
    expect((await call(listParts, bearer(token))).status).toBe(200);
    await changing(maker.id, 0, { disabled: true });
    expect((await call(listParts, bearer(token))).status).toBe(401);
  });

  it('cannot name what a person signs or keeps for themselves, nor a call that does not exist', async () => {
    for (const name of [
      'release-shipment',
      'sign-inspection',
      'change-password',
      'create-person',
      'create-machine-token',
      'sign-in',
      'x',
    ]) {
      const answer = await call(makeToken, {
        method: 'POST',
        as: administrator,
        body: { name: 'Robot', calls: ['list-parts', name] },
      });
      expect([name, answer.status, answer.errors[0]?.path]).toEqual([name, 422, 'calls.1']);
    }
  });
});
