import { newId, nextNumber } from '@/db/identity';
import { insert } from '@/db/models/table';
import { baskets } from '@/db/repositories/baskets';
import { runById } from '@/db/repositories/runs';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketAnswer, openBasket as contract } from '@/services/contracts/baskets';
import type { BodyOf } from '@/services/contracts/operation';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { basketRefusal } from './clean-content';
import { readBasket } from './read-basket';
import { operationOf, type Operation } from './set-up';

type By = Work & { readonly actor: Actor };

function wrong(path: string, message: string): Problem {
  return new Problem('invalid-input', `${path}: ${message}`, [{ path, message }]);
}

async function wantedOperation(work: By, body: BodyOf<typeof contract>): Promise<Operation> {
  const operation = await operationOf(work, body.partNumber, body.requirement);
  if (!operation) throw wrong('requirement', `no approved plan of ${body.partNumber} asks for ${body.requirement}`);
  const refusal = basketRefusal(operation.asked);
  if (refusal !== null) throw wrong('requirement', `${operation.row.operation} ${operation.row.title} ${refusal}`);
  return operation;
}

/** A run that may feed the basket: of the same technique, and not void. */
async function refuseRun(work: By, runId: string, { row }: Operation): Promise<void> {
  const run = await runById(work, runId);
  if (!run) throw wrong('run', 'is not a known run');
  if (run.technique !== row.technique)
    throw wrong('run', `${run.number} is a run by ${run.technique}, not by ${row.technique ?? 'no technique'}`);
  if (run.standing === 'void')
    throw wrong('run', `${run.number} is void: a value was outside its window; its parts are processed again`);
}

/** Opens a basket for the person who asks. Problems: invalid-input with its field. */
export async function openBasket(work: By, body: BodyOf<typeof contract>): Promise<Recorded<BasketAnswer>> {
  const operation = await wantedOperation(work, body);
  const { row, drawingId } = operation;
  if (body.run) await refuseRun(work, body.run, operation);
  const id = newId();
  const number = await nextNumber(work, 'B');
  await insert(work, baskets, {
    id,
    number,
    drawingId,
    requirementKey: row.key,
    operation: row.operation,
    title: row.title,
    method: row.method,
    technique: row.technique,
    line: body.line ?? null,
    runId: body.run ?? null,
    process: body.run ? [] : body.process,
    acts: body.acts,
    countIn: body.countIn,
    state: 'open',
    evaluatorId: work.actor.id,
    splitFrom: null,
    openedBy: work.actor.id,
    openedAt: work.now,
    endedAt: null,
    version: 1,
  });
  const answer = await readBasket(work, id, work.now);
  return {
    answer,
    headers: { location: `/api/baskets/${id}` },
    events: [
      {
        subject: { kind: 'basket', id },
        details: {
          number,
          partNumber: body.partNumber,
          operation: row.operation,
          title: row.title,
          countIn: body.countIn,
          run: answer.run?.number ?? null,
          process: answer.process,
          acts: body.acts,
        },
      },
    ],
  };
}
