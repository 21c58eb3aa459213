import { QueryTypes, type Sequelize, type Transaction } from 'sequelize';
import type { Actor } from '../services/contracts/actor';
import { database } from './connection';

/** A place to read from: the pool, or inside a transaction. */
export interface Reading {
  readonly sequelize: Sequelize;
  readonly transaction?: Transaction;
}

/** One transaction of one person (or of the product itself: actor null). `now` is the database server's clock. */
export interface Work extends Reading {
  readonly transaction: Transaction;
  readonly actor: Actor | null;
  /** ISO instant, UTC, microseconds. */
  readonly now: string;
}

/** SQL that prints a DATETIME(6) as an ISO instant without losing microseconds. */
export function isoOf(column: string): string {
  return `DATE_FORMAT(${column}, '%Y-%m-%dT%H:%i:%s.%fZ')`;
}

/** ISO instant as MariaDB writes it; the connection's zone is UTC. */
export function sqlTimeOf(iso: string): string {
  return iso.replace('T', ' ').replace(/Z$/, '');
}

/** Parameterised SELECT; rows come back as plain objects with the names given in the SQL. */
export async function select<Row extends object>(
  reading: Reading,
  sql: string,
  replacements: readonly unknown[] = [],
): Promise<Row[]> {
  return reading.sequelize.query<Row>(sql, {
    type: QueryTypes.SELECT,
    replacements: [...replacements],
    ...(reading.transaction ? { transaction: reading.transaction } : {}),
  });
}

/** First row of a SELECT, or undefined. */
export async function selectOne<Row extends object>(
  reading: Reading,
  sql: string,
  replacements: readonly unknown[] = [],
): Promise<Row | undefined> {
  return (await select<Row>(reading, sql, replacements))[0];
}

/** Parameterised UPDATE, INSERT … SELECT or DELETE; answers the number of rows it touched. */
export async function execute(work: Work, sql: string, replacements: readonly unknown[] = []): Promise<number> {
  // The connector answers [packet, undefined] for UPDATE and DELETE, [insertId, affectedRows] for INSERT.
  const [packet, meta]: unknown[] = await work.sequelize.query(sql, {
    replacements: [...replacements],
    transaction: work.transaction,
  });
  const told = meta ?? packet;
  return typeof told === 'number' ? told : ((told as { affectedRows?: number } | undefined)?.affectedRows ?? 0);
}

/** The database server's clock. */
export async function databaseNow(reading: Reading = { sequelize: database() }): Promise<string> {
  const row = await selectOne<{ now: string }>(reading, `SELECT ${isoOf('UTC_TIMESTAMP(6)')} AS now`);
  if (!row) throw new Error('the database did not answer its clock');
  return row.now;
}

const replayable = new Set([1213, 1205, 1020]);

function replays(error: unknown): boolean {
  const errno = (error as { original?: { errno?: number } }).original?.errno;
  return errno !== undefined && replayable.has(errno);
}

/** Runs `act` in one transaction and replays the whole of it on deadlock, lock wait or changed record (five tries). */
export async function inTransaction<T>(
  actor: Actor | null,
  act: (work: Work) => Promise<T>,
  sequelize: Sequelize = database(),
): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await sequelize.transaction(async (transaction) => {
        const now = await databaseNow({ sequelize, transaction });
        return act({ sequelize, transaction, actor, now });
      });
    } catch (error) {
      if (attempt >= 5 || !replays(error)) throw error;
      await new Promise((done) => setTimeout(done, attempt * 15));
    }
  }
}

/** The pool, for reading outside a transaction. */
export function reading(): Reading {
  return { sequelize: database() };
}
