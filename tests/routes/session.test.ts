import { randomBytes } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { DELETE as signOut, GET as readSession, POST as signIn } from '@/app/api/session/route';
import { ownPath } from '@/components/accounts/own-path';
import { execute, inTransaction, reading, select } from '@/db/work';
import { attemptLimits, rememberAttempt } from '@/services/accounts/rate-limit';
import { call, person, signingPassword, type Answer, type Person } from './inspection-setting';

let inspector: Person;
const emailOf = ({ id }: Person) => `${id}@aldermoor.example`;
/** Each test its own network address, so that the limit per address of one does not reach another. */
const freshAddress = () => `198.51.100.${String(randomBytes(1)[0])}-${randomBytes(4).toString('hex')}`;

function entering(email: string, password: string, more: Record<string, string> = {}): Promise<Answer> {
  return call(signIn, { method: 'POST', body: { email, password }, headers: { 'x-forwarded-for': freshAddress(), ...more } });
}

const cookieOf = (answer: Answer) => answer.headers.get('set-cookie')?.split(';')[0] ?? '';
const withCookie = (cookie: string): Person => ({ id: '', name: '', cookie });

beforeAll(async () => {
  inspector = await person('inspector');
});

describe('signing in', () => {
  it('answers 204 and a cookie that scripts cannot read, under which one is known', async () => {
    const answer = await entering(emailOf(inspector), signingPassword);
    expect(answer.status).toBe(204);
    expect(answer.headers.get('set-cookie')).toMatch(/^ringtrue-session=[a-z0-9]{40}; /);
    expect(answer.headers.get('set-cookie')).toMatch(/HttpOnly/);
    expect(answer.headers.get('set-cookie')).toMatch(/SameSite=Lax/);
    const known = await call(readSession, { as: withCookie(cookieOf(answer)) });
    expect(known.json).toMatchObject({ user: { id: inspector.id, role: 'inspector', email: emailOf(inspector) } });
  });

  it('answers the same to an unknown person, a wrong password, a disabled account and a finished engagement', async () => {
    const [disabled, finished] = [await person('inspector'), await person('auditor')];
    await inTransaction(null, async (work) => {
      await execute(work, 'UPDATE accounts SET disabled_at = UTC_TIMESTAMP(6) WHERE id = ?', [disabled.id]);
      await execute(work, 'UPDATE accounts SET access_until = UTC_TIMESTAMP(6) - INTERVAL 1 SECOND WHERE id = ?', [finished.id]);
    });
    const answers = [
      await entering('nobody-at-all@aldermoor.example', signingPassword),
      await entering(emailOf(inspector), 'not-the-password'),
      await entering(emailOf(disabled), signingPassword),
      await entering(emailOf(finished), signingPassword),
    ];
    for (const answer of answers) {
      expect([answer.status, answer.json, answer.headers.get('set-cookie')]).toEqual([401, answers[0]?.json, null]);
      expect([...answer.headers]).toEqual([...(answers[0]?.headers ?? [])]);
    }
    expect(answers[0]?.problem).toBe('sign-in-refused');
  });

  it('spends the work of a password check on an unknown person too', async () => {
    const took = async (email: string) => {
      const start = performance.now();
      await entering(email, 'not-the-password');
      return performance.now() - start;
    };
    const median = (values: number[]) => [...values].sort((a, b) => a - b)[2] ?? 0;
    const other = await person('inspector');
    const known: number[] = [];
    const unknown: number[] = [];
    await took('warm-up@aldermoor.example');
    for (let round = 0; round < 5; round += 1) {
      known.push(await took(emailOf(other)));
      unknown.push(await took(`${randomBytes(6).toString('hex')}@aldermoor.example`));
    }
    // Without the work on nobody's hash the unknown answer comes in a few milliseconds, the known one in tens.
    expect(median(unknown)).toBeGreaterThan(median(known) * 0.5);
  });

  it('makes a new session id whatever the browser came with, and ends the one it came with', async () => {
    const planted = `ringtrue-session=${'a'.repeat(40)}`;
    const first = await entering(emailOf(inspector), signingPassword, { cookie: planted });
    expect(cookieOf(first)).not.toBe(planted);
    expect((await call(readSession, { as: withCookie(planted) })).status).toBe(401);
    const second = await entering(emailOf(inspector), signingPassword, { cookie: cookieOf(first) });
    expect(cookieOf(second)).not.toBe(cookieOf(first));
    expect((await call(readSession, { as: withCookie(cookieOf(first)) })).status).toBe(401);
    expect((await call(readSession, { as: withCookie(cookieOf(second)) })).status).toBe(200);
  });

  it('stops guessing at one e-mail with 429 and Retry-After, the right password included', async () => {
    const guessed = await person('inspector');
    for (let tried = 0; tried < attemptLimits.perEmail; tried += 1)
      expect((await entering(emailOf(guessed), `guess number ${String(tried)}`)).status).toBe(401);
    const answer = await entering(emailOf(guessed), signingPassword);
    expect([answer.status, answer.problem]).toEqual([429, 'too-many-attempts']);
    expect(Number(answer.headers.get('retry-after'))).toBeGreaterThan(0);
    expect(answer.headers.get('set-cookie')).toBeNull();
    expect((await entering(emailOf(inspector), signingPassword)).status).toBe(204);
  });

  it('stops one address that tries many people', async () => {
    const address = freshAddress();
    await inTransaction(null, async (work) => {
      for (let tried = 0; tried < attemptLimits.perAddress; tried += 1)
        await rememberAttempt(work, { email: `${String(tried)}@${address}`, accountId: null, address, outcome: 'refused' });
    });
    const answer = await entering(emailOf(inspector), signingPassword, { 'x-forwarded-for': address });
    expect([answer.status, answer.headers.get('retry-after')]).toEqual([429, '900']);
  });
});

describe('a request from another site', () => {
  it('is refused, from our own address it is taken', async () => {
    const foreign = await entering(emailOf(inspector), signingPassword, { origin: 'https://elsewhere.example' });
    expect([foreign.status, foreign.problem, foreign.headers.get('set-cookie')]).toEqual([403, 'foreign-origin', null]);
    expect((await entering(emailOf(inspector), signingPassword, { origin: 'null', host: '127.0.0.1:3200' })).status).toBe(403);
    const own = new URL(process.env.RINGTRUE_BASE_URL ?? '').origin;
    expect((await entering(emailOf(inspector), signingPassword, { origin: own })).status).toBe(204);
  });
});

describe('a session', () => {
  it('is stored as a hash only', async () => {
    const cookie = cookieOf(await entering(emailOf(inspector), signingPassword));
    const value = cookie.split('=')[1] ?? '';
    const rows = await select<{ id: string }>(reading(), 'SELECT id FROM sessions WHERE user_id = ?', [inspector.id]);
    expect(rows.length).toBeGreaterThan(0);
    for (const { id } of rows) expect(id).toMatch(/^[0-9a-f]{64}$/);
    expect(rows.map(({ id }) => id)).not.toContain(value);
  });

  it('ends at sign-out, alone or everywhere', async () => {
    const leaving = await person('inspector');
    const [one, two, three] = [
      cookieOf(await entering(emailOf(leaving), signingPassword)),
      cookieOf(await entering(emailOf(leaving), signingPassword)),
      leaving.cookie,
    ].map(withCookie) as [Person, Person, Person];
    const left = await call(signOut, { method: 'DELETE', as: one });
    expect([left.status, left.headers.get('set-cookie')]).toEqual([204, expect.stringContaining('Max-Age=0')]);
    expect((await call(readSession, { as: one })).status).toBe(401);
    expect((await call(readSession, { as: two })).status).toBe(200);
    expect((await call(signOut, { method: 'DELETE', as: two, query: '?everywhere=true' })).status).toBe(204);
    for (const each of [one, two, three]) expect((await call(readSession, { as: each })).status).toBe(401);
  });

  it('ends for an auditor at the end of access, at the next request', async () => {
    const auditor = await person('auditor');
    expect((await call(readSession, { as: auditor })).status).toBe(200);
    await inTransaction(null, (work) =>
      execute(work, 'UPDATE accounts SET access_until = UTC_TIMESTAMP(6) - INTERVAL 1 SECOND WHERE id = ?', [auditor.id]),
    );
    expect((await call(readSession, { as: auditor })).status).toBe(401);
  });

  it('ends twelve hours after the sign-in, however much it is used', async () => {
    const busy = await person('inspector');
    await inTransaction(null, (work) =>
      execute(work, 'UPDATE sessions SET created_at = created_at - INTERVAL 12 HOUR WHERE user_id = ?', [busy.id]),
    );
    expect((await call(readSession, { as: busy })).status).toBe(401);
  });

  it.each([[''], ['x'], ["' OR 1=1 -- "], ['%00']])('is not opened by the value %j', async (value) => {
    expect((await call(readSession, { as: withCookie(`ringtrue-session=${value}`) })).status).toBe(401);
  });
});

describe('the path after the sign-in', () => {
  it.each([
    ['/parts?state=released#ring', '/parts?state=released#ring'],
    [undefined, '/'],
    ['https://elsewhere.example/', '/'],
    ['//elsewhere.example/', '/'],
    ['/\\elsewhere.example', '/'],
    ['/\t/elsewhere.example', '/'],
    ['/.//elsewhere.example', '/'],
    ['javascript:alert(1)', '/'],
    ['/api/session', '/'],
    ['/sign-in?next=/sign-in', '/'],
  ])('%j leads to %s', (next, path) => {
    expect(ownPath(next)).toBe(path);
  });
});
