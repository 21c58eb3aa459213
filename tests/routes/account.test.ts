import { describe, expect, it } from 'vitest';
import { POST as changePassword } from '@/app/api/account/password/route';
import { PUT as setPin } from '@/app/api/account/pin/route';
import { GET as readAccount, PATCH as changeAccount } from '@/app/api/account/route';
import { GET as readSession, POST as signIn } from '@/app/api/session/route';
import { browserWords } from '@/components/accounts/browser-words';
import { accountById, actorOf } from '@/db/repositories/accounts';
import { reading, select } from '@/db/work';
import { confirmSignature } from '@/services/accounts/confirm-signature';
import { passwordFault, readAccount as readContract } from '@/services/contracts/accounts';
import type { Problem } from '@/services/http/problem';
import { call, person, signingPassword, type Answer, type Person } from './inspection-setting';

const emailOf = ({ id }: Person) => `${id}@aldermoor.example`;
const entering = (who: Person, password: string): Promise<Answer> =>
  call(signIn, { method: 'POST', body: { email: emailOf(who), password }, headers: { 'x-forwarded-for': '192.0.2.44' } });
const accountOf = async (who: Person) => readContract.response.parse((await call(readAccount, { as: who })).json);
const chosen = 'copper-kettle-on-the-hob-7';

describe('the own account', () => {
  it('is nobody else’s: no session, no answer', async () => {
    expect((await call(readAccount, {})).status).toBe(401);
    expect((await call(changeAccount, { method: 'PATCH', body: { locale: 'fr' } })).status).toBe(401);
    expect((await call(changePassword, { method: 'POST', body: { password: 'x', newPassword: chosen } })).status).toBe(401);
    expect((await call(setPin, { method: 'PUT', body: { password: 'x', pin: '442291' } })).status).toBe(401);
  });

  it('shows last sign-ins with address and outcome, open sessions with this one marked, and no hashes', async () => {
    const who = await person('inspector');
    await entering(who, 'not-the-password');
    await entering(who, signingPassword);
    const account = await accountOf(who);
    expect(account.signIns.map(({ address, outcome }) => [address, outcome])).toEqual([
      ['192.0.2.44', 'signed-in'],
      ['192.0.2.44', 'refused'],
    ]);
    expect(account.sessions.filter(({ current }) => current)).toHaveLength(1);
    expect(account.sessions).toHaveLength(2);
    expect(JSON.stringify(account)).not.toMatch(/argon2|[0-9a-f]{64}/);
  });

  it('keeps its language', async () => {
    const who = await person('customer-quality');
    const answer = await call(changeAccount, { method: 'PATCH', as: who, body: { locale: 'fr' } });
    expect([answer.status, (await accountOf(who)).locale]).toEqual([200, 'fr']);
    expect((await call(changeAccount, { method: 'PATCH', as: who, body: { locale: 'de' } })).status).toBe(422);
    expect((await call(changeAccount, { method: 'PATCH', as: who, body: { locale: 'fr', role: 'administrator' } })).status).toBe(
      422,
    );
  });
});

describe('a browser in a few words', () => {
  // Headers in the form browsers send, from memory.
  it.each([
    ['Mozilla/5.0 (Windows NT 10.0; Win64; x64; rv:140.0) Gecko/20100101 Firefox/140.0', 'Firefox 140, Windows'],
    [
      'Mozilla/5.0 (X11; Linux x86_64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/150.0.0.0 Safari/537.36',
      'Chrome 150, Linux',
    ],
    [
      'Mozilla/5.0 (Windows NT 10.0) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/150.0 Safari/537.36 Edg/150.0',
      'Edge 150, Windows',
    ],
    ['measuring-script', 'measuring-script'],
    ['', '–'],
  ])('%j is %s', (agent, words) => {
    expect(browserWords(agent)).toBe(words);
  });
});

describe('changing the password', () => {
  it('needs the present one, ends every other session, goes on under a new cookie, and the old one no longer signs in', async () => {
    const who = await person('inspector');
    const elsewhere = (await entering(who, signingPassword)).headers.get('set-cookie')?.split(';')[0] ?? '';
    const wrong = await call(changePassword, { method: 'POST', as: who, body: { password: 'wrong', newPassword: chosen } });
    expect([wrong.status, wrong.problem, wrong.errors[0]?.path]).toEqual([403, 'signature-refused', 'password']);
    const answer = await call(changePassword, {
      method: 'POST',
      as: who,
      body: { password: signingPassword, newPassword: chosen },
    });
    expect(answer.status).toBe(204);
    const cookie = answer.headers.get('set-cookie')?.split(';')[0] ?? '';
    expect(cookie).not.toBe(who.cookie);
    expect((await call(readSession, { as: { ...who, cookie } })).status).toBe(200);
    for (const old of [who.cookie, elsewhere])
      expect((await call(readSession, { as: { ...who, cookie: old } })).status).toBe(401);
    expect((await entering(who, signingPassword)).status).toBe(401);
    expect((await entering(who, chosen)).status).toBe(204);
    const told = await select<{ kind: string; body: Buffer }>(
      reading(),
      `SELECT kind, body FROM events WHERE subject_id = ? AND kind = 'password-changed'`,
      [who.id],
    );
    expect(told).toHaveLength(1);
    expect(told[0]?.body.toString('utf8')).not.toContain(chosen);
  });

  it('refuses what breaks the rule, naming the field', async () => {
    const who = await person('inspector');
    for (const newPassword of ['elevenchars', emailOf(who), emailOf(who).toUpperCase(), 'aaaaaaaaaaaaaaaa', signingPassword]) {
      const answer = await call(changePassword, { method: 'POST', as: who, body: { password: signingPassword, newPassword } });
      expect([newPassword, answer.status, answer.errors[0]?.path]).toEqual([newPassword, 422, 'newPassword']);
    }
  });

  it.each([
    ['twelve chars', null],
    ['é'.repeat(4) + 'clairé cuit', null],
    ['eleven char', 'must have at least 12 characters'],
    ['a.person@foundry.example', 'must not be the e-mail'],
    ['A.Person@Foundry.Example1', 'must not be the e-mail'],
    ['121212121212', 'must have at least 5 different characters'],
  ])('judges %j: %s', (password, fault) => {
    expect(passwordFault(password, 'a.person@foundry.example')).toBe(fault);
  });
});

describe('the PIN', () => {
  const actor = async (who: Person) => {
    const account = await accountById(reading(), who.id);
    if (!account) throw new Error('no account');
    return actorOf(account, /ringtrue-session=([^;]+)/.exec(who.cookie)?.[1] ?? null);
  };
  const refusal = async (who: Person, proof: { pin?: string; password?: string }): Promise<string | null> => {
    try {
      await confirmSignature(await actor(who), proof);
      return null;
    } catch (error) {
      return (error as Problem).errors[0]?.message ?? (error as Problem).code;
    }
  };

  it('is set with the password only, and is six to twelve digits, not one repeated', async () => {
    const who = await person('inspector');
    const wrong = await call(setPin, { method: 'PUT', as: who, body: { password: 'wrong', pin: '442291' } });
    expect([wrong.status, wrong.problem]).toEqual([403, 'signature-refused']);
    for (const pin of ['44229', '4422919191919', '44a291', '777777']) {
      const answer = await call(setPin, { method: 'PUT', as: who, body: { password: signingPassword, pin } });
      expect([pin, answer.status, answer.errors[0]?.path]).toEqual([pin, 422, 'pin']);
    }
    expect((await call(setPin, { method: 'PUT', as: who, body: { password: signingPassword, pin: '442291' } })).status).toBe(204);
    expect(await refusal(who, { pin: '442291' })).toBeNull();
  });

  it('locks after five wrong tries, even for the right PIN, and the password unlocks it', async () => {
    const who = await person('inspector');
    await call(setPin, { method: 'PUT', as: who, body: { password: signingPassword, pin: '442291' } });
    for (let tried = 0; tried < 5; tried += 1) expect(await refusal(who, { pin: '000001' })).toBe('is wrong');
    expect(await refusal(who, { pin: '442291' })).toBe('is locked; use the password');
    expect((await accountOf(who)).pin).toBe('locked');
    expect(await refusal(who, { password: signingPassword })).toBeNull();
    expect(await refusal(who, { pin: '442291' })).toBeNull();
  });

  it('is judged at most five times when twenty tries come at once', async () => {
    const who = await person('inspector');
    await call(setPin, { method: 'PUT', as: who, body: { password: signingPassword, pin: '442291' } });
    const answers = await Promise.all(Array.from({ length: 20 }, () => refusal(who, { pin: '000001' })));
    expect(answers.filter((answer) => answer === 'is wrong')).toHaveLength(5);
    expect(answers.filter((answer) => answer === 'is locked; use the password')).toHaveLength(15);
  });

  it('does not forgive four wrong tries by a right one of another', async () => {
    const [who, other] = [await person('inspector'), await person('inspector')];
    for (let tried = 0; tried < 4; tried += 1) await refusal(who, { pin: '000001' });
    expect(await refusal(other, { pin: signingPassword })).toBeNull();
    expect(await refusal(who, { pin: '000001' })).toBe('is wrong');
    expect(await refusal(who, { pin: signingPassword })).toBe('is locked; use the password');
  });
});
