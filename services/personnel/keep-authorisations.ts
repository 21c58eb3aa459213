import { inspects } from '@/db/repositories/accounts';
import {
  isLevelThree,
  keepAuthorisation,
  markGranted,
  markWithdrawn,
  takeAuthorisation,
  techniqueExists,
} from '@/db/repositories/personnel';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { Authorisation, prepareAuthorisation as prepareContract } from '@/services/contracts/personnel';
import { notFound, Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { plantToday } from './plant-today';

type By = Work & { readonly actor: Actor };
type Body = BodyOf<typeof prepareContract>;

/** Longest time an authorisation runs before it is looked at again: five years (EN 4179, ISO 9712, from memory). */
const longestYears = 5;

function dateFaults({ validFrom, validTo }: Body, today: string): FieldError[] {
  const latest = `${String(Number(validFrom.slice(0, 4)) + longestYears)}${validFrom.slice(4)}`;
  if (validTo < validFrom) return [{ path: 'validTo', message: 'is before the first day' }];
  if (validTo < today) return [{ path: 'validTo', message: 'is past' }];
  if (validTo > latest) return [{ path: 'validTo', message: `is more than ${String(longestYears)} years after the first day` }];
  return [];
}

async function faultsOf(work: By, body: Body): Promise<FieldError[]> {
  const { day } = await plantToday(work);
  const staff = await inspects(work, body.person);
  const unknownTechnique = body.technique !== undefined && !(await techniqueExists(work, body.technique, body.method));
  return [
    ...(staff ? [] : [{ path: 'person', message: 'is not an inspector or reviewer of this plant' }]),
    ...(unknownTechnique ? [{ path: 'technique', message: `is not a technique of ${body.method}` }] : []),
    ...dateFaults(body, day),
  ];
}

async function taken(work: By, id: string): Promise<Authorisation> {
  const row = await takeAuthorisation(work, await plantToday(work), id);
  if (!row) throw notFound('Authorisation');
  return row;
}

async function recorded(work: By, id: string, details: Record<string, unknown>): Promise<Recorded<Authorisation>> {
  const answer = await taken(work, id);
  const { method, technique, level, validFrom, validTo } = answer;
  return {
    answer,
    events: [
      {
        subject: { kind: 'authorisation', id },
        also: [{ kind: 'account', id: answer.person.id }],
        details: { method, technique, level, validFrom, validTo, ...details },
      },
    ],
  };
}

/** Prepares an authorisation; nothing counts yet. Problem: invalid-input. */
export async function prepareAuthorisation(work: By, body: Body): Promise<Recorded<Authorisation>> {
  const errors = await faultsOf(work, body);
  if (errors.length > 0)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path}: ${message}`).join('; '), errors);
  const { person, method, level, validFrom, validTo, technique = null, products = null } = body;
  const id = await keepAuthorisation(work, {
    ...{ person, method, level, validFrom, validTo, technique, products },
    preparedBy: work.actor.id,
  });
  return recorded(work, id, {});
}

/** Grants it: by a level 3 of the method, neither the person nor who prepared it. Problems: not-permitted, state-refused, not-found. */
export async function grantAuthorisation(work: By, id: string): Promise<Recorded<Authorisation>> {
  const row = await taken(work, id);
  if (row.person.id === work.actor.id) throw new Problem('not-permitted', 'Nobody grants their own authorisation.');
  if (row.preparedBy?.id === work.actor.id)
    throw new Problem('not-permitted', 'An authorisation is granted by a second person, not by who prepared it.');
  const { day } = await plantToday(work);
  if (!(await isLevelThree(work, work.actor.id, row.method, row.technique, day)))
    throw new Problem('not-permitted', `Only a reviewer who is level 3 in ${row.method} today grants this authorisation.`);
  if (row.state !== 'prepared') throw new Problem('state-refused', 'This authorisation is granted or withdrawn already.');
  if (row.validTo < day) throw new Problem('state-refused', 'The last day of this authorisation is past; prepare it anew.');
  await markGranted(work, id, work.actor.id);
  return recorded(work, id, {});
}

/** Withdraws it from now on; a withdrawn one never comes back. Any reviewer may: that is the safe direction. */
export async function withdrawAuthorisation(work: By, id: string, reason: string): Promise<Recorded<Authorisation>> {
  const row = await taken(work, id);
  if (row.state === 'withdrawn') throw new Problem('state-refused', 'This authorisation is withdrawn already.');
  await markWithdrawn(work, id, reason);
  return recorded(work, id, { reason });
}
