import { QueryTypes } from 'sequelize';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { connect } from '@/db/connection';
import { newId, nextNumber } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { insert } from '@/db/models/table';
import { lots } from '@/db/repositories/lots';
import { databaseNow, execute, inTransaction, reading, select, selectOne, type Work } from '@/db/work';
import '../support/stack';

const owner = connect(process.env.RINGTRUE_DATABASE_OWNER_URL ?? '', 2);
const scratch = `idioms_${newId().replaceAll('-', '').slice(-12)}`;

/** A temporary table lives on one connection: everything of it inside one transaction. */
async function onScratch<T>(act: (work: Work) => Promise<T>): Promise<T> {
  return inTransaction(null, act, owner);
}

beforeAll(async () => {
  await owner.query(
    `CREATE TABLE ${scratch} (id INT PRIMARY KEY, amount DECIMAL(20,16) NULL, plain DECIMAL(6,2) NULL, big BIGINT NULL, at DATETIME(6) NULL, note VARCHAR(80) NULL)`,
  );
});

afterAll(async () => {
  await owner.query(`DROP TABLE ${scratch}`);
  await owner.close();
});

describe('decimals', () => {
  it.each([['0.10'], ['-0.10'], ['1234.50'], ['0.00']])('%s comes back as the same text', async (text) => {
    const back = await onScratch(async (work) => {
      await execute(work, `REPLACE INTO ${scratch} (id, plain) VALUES (1, ?)`, [text]);
      return selectOne<{ plain: unknown }>(work, `SELECT plain FROM ${scratch} WHERE id = 1`);
    });
    expect(back?.plain).toBe(text);
  });

  it('sixteen digits after the point survive, which a double would not', async () => {
    const text = '1234.1234567890123456';
    const back = await onScratch(async (work) => {
      await execute(work, `REPLACE INTO ${scratch} (id, amount) VALUES (1, ?)`, [text]);
      return selectOne<{ amount: unknown }>(work, `SELECT amount FROM ${scratch} WHERE id = 1`);
    });
    expect(back?.amount).toBe(text);
    expect(String(Number(text))).not.toBe(text);
  });

  it('a whole number beyond 2^53 is refused rather than rounded', async () => {
    await onScratch((work) => execute(work, `REPLACE INTO ${scratch} (id, big) VALUES (1, 9007199254740993)`));
    await expect(onScratch((work) => select(work, `SELECT big FROM ${scratch} WHERE id = 1`))).rejects.toThrow();
  });
});

describe('times', () => {
  it('keep their microseconds, in UTC, and the clock is the database server’s', async () => {
    const back = await onScratch(async (work) => {
      await execute(work, `REPLACE INTO ${scratch} (id, at) VALUES (1, '2026-03-29 01:30:00.123456')`);
      return selectOne<{ at: string }>(
        work,
        `SELECT DATE_FORMAT(at, '%Y-%m-%dT%H:%i:%s.%fZ') AS at FROM ${scratch} WHERE id = 1`,
      );
    });
    expect(back?.at).toBe('2026-03-29T01:30:00.123456Z');
    expect(await databaseNow()).toMatch(/^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{6}Z$/);
    const [zone] = await select<{ zone: string }>(reading(), 'SELECT @@session.time_zone AS zone');
    expect(zone?.zone).toBe('+00:00');
  });
});

describe('raw statements', () => {
  it('a SELECT answers plain rows, with parameters as values and never as SQL', async () => {
    const hostile = `'; DROP TABLE ${scratch}; -- \\' " ? :x`;
    const back = await onScratch(async (work) => {
      await execute(work, `REPLACE INTO ${scratch} (id, note) VALUES (1, ?)`, [hostile]);
      return select<{ id: number; note: string }>(work, `SELECT id, note FROM ${scratch} WHERE note = ?`, [hostile]);
    });
    expect(back).toEqual([{ id: 1, note: hostile }]);
    expect(await select(reading(), 'SELECT 1 AS one WHERE 1 = 0')).toEqual([]);
    expect(await selectOne(reading(), 'SELECT 1 AS one WHERE 1 = 0')).toBeUndefined();
  });

  it('execute counts the rows it touched: inserted, changed, deleted, none', async () => {
    const counts = await onScratch(async (work) => {
      await execute(work, `DELETE FROM ${scratch}`);
      return [
        await execute(work, `INSERT INTO ${scratch} (id, note) VALUES (11, 'a'), (12, 'a'), (13, 'b')`),
        await execute(work, `INSERT IGNORE INTO ${scratch} (id, note) VALUES (11, 'c')`),
        await execute(work, `INSERT INTO ${scratch} (id, note) SELECT id + 10, note FROM ${scratch} WHERE note = 'a'`),
        await execute(work, `UPDATE ${scratch} SET note = 'z' WHERE note = ?`, ['a']),
        await execute(work, `UPDATE ${scratch} SET note = 'y' WHERE note = ?`, ['nobody']),
        await execute(work, `DELETE FROM ${scratch} WHERE note = ?`, ['z']),
      ];
    });
    expect(counts).toEqual([3, 0, 2, 4, 0, 4]);
  });
});

describe('transactions', () => {
  it('take everything back when something throws', async () => {
    const id = newId();
    const failing = inTransaction(null, async (work) => {
      await keepLot(work, id);
      throw new Error('stop');
    });
    await expect(failing).rejects.toThrow('stop');
    expect(await select(reading(), 'SELECT id FROM lots WHERE id = ?', [id])).toEqual([]);
  });

  it('run at READ COMMITTED: what another commits meanwhile is seen by the next look', async () => {
    const id = newId();
    await inTransaction(null, (work) => keepLot(work, id));
    const look = (work: Work) => selectOne<{ quantity: number }>(work, 'SELECT quantity FROM lots WHERE id = ?', [id]);
    const seen = await inTransaction(null, async (work) => {
      const before = await look(work);
      await inTransaction(null, (other) => execute(other, 'UPDATE lots SET quantity = 7 WHERE id = ?', [id]));
      return [before?.quantity, (await look(work))?.quantity];
    });
    expect(seen).toEqual([1, 7]);
  });

  it('number without gaps or doubles when twenty ask at once', async () => {
    const prefix = `Z${newId().slice(-6)}`;
    const numbers = await Promise.all(Array.from({ length: 20 }, () => inTransaction(null, (work) => nextNumber(work, prefix))));
    expect(numbers.map((number) => Number(number.slice(-5))).sort((a, b) => a - b)).toEqual(
      Array.from({ length: 20 }, (_, i) => i + 1),
    );
  });

  it('two who take the same rows queue: the second sees what the first wrote', async () => {
    const id = newId();
    await inTransaction(null, (work) => keepLot(work, id));
    const seen: number[] = [];
    const taking = () =>
      inTransaction(null, async (work) => {
        await takeRows(work, 'lots', [id]);
        const row = await selectOne<{ quantity: number }>(work, 'SELECT quantity FROM lots WHERE id = ?', [id]);
        seen.push(row?.quantity ?? -1);
        await new Promise((done) => setTimeout(done, 20));
        await execute(work, 'UPDATE lots SET quantity = ? WHERE id = ?', [(row?.quantity ?? 0) + 1, id]);
      });
    await Promise.all(Array.from({ length: 6 }, taking));
    expect(seen).toEqual([1, 2, 3, 4, 5, 6]);
  });
});

describe('SKIP LOCKED', () => {
  it('really skips: a second asker gets another row at once, a third finds none', async () => {
    await onScratch(async (work) => {
      await execute(work, `DELETE FROM ${scratch}`);
      await execute(work, `INSERT INTO ${scratch} (id, note) VALUES (1, 'queued'), (2, 'queued')`);
    });
    const two = connect(process.env.RINGTRUE_DATABASE_OWNER_URL ?? '', 3);
    const next = (work: Work) =>
      selectOne<{ id: number }>(
        work,
        `SELECT id FROM ${scratch} WHERE note = 'queued' ORDER BY id LIMIT 1 FOR UPDATE SKIP LOCKED`,
      );
    try {
      const got = await inTransaction(
        null,
        async (first) => {
          const one = await next(first);
          return inTransaction(
            null,
            async (second) => {
              const other = await next(second);
              const third = await inTransaction(null, next, two);
              return [one?.id, other?.id, third?.id];
            },
            two,
          );
        },
        two,
      );
      expect(got).toEqual([1, 2, undefined]);
    } finally {
      await two.close();
    }
  });

  it('is written out by the query builder too, which believes the dialect lacks it', async () => {
    const model = owner.define(scratch, {}, { tableName: scratch, timestamps: false });
    let written = '';
    await owner.transaction(async (transaction) => {
      const logging = (sql: string) => (written = sql);
      await model.findAll({ attributes: ['id'], lock: transaction.LOCK.UPDATE, skipLocked: true, transaction, logging });
    });
    expect(written).toContain('FOR UPDATE SKIP LOCKED');
  });
});

describe('the application’s user', () => {
  it.each([
    ['UPDATE events SET kind = kind WHERE seq = 0'],
    ['DELETE FROM sign_ins WHERE address = ?'],
    ['UPDATE vision_tests SET result = result WHERE tested_on = ?'],
    ['TRUNCATE TABLE accounts'],
    ['DROP TABLE sessions'],
    ['CREATE TABLE mine (id INT)'],
  ])('may not: %s', async (sql) => {
    await expect(reading().sequelize.query(sql, { replacements: ['x'], type: QueryTypes.RAW })).rejects.toThrow(/denied/);
  });
});

async function keepLot(work: Work, id: string): Promise<void> {
  await insert(work, lots, {
    ...{ id, kind: 'cluster', number: `C-${id.slice(-10)}`, quantity: 1, attributes: {}, version: 0 },
    ...{ createdBy: id, createdAt: work.now },
  });
}
