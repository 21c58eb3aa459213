import { DataTypes, type Model, type ModelStatic, type Sequelize, type Transaction } from 'sequelize';
import { sqlTimeOf } from '../work';

/** How a column travels: `time` is an ISO instant with microseconds, `json` any JSON value, `decimal` stays text. */
export type ColumnKind = 'uuid' | 'text' | 'int' | 'flag' | 'time' | 'date' | 'json' | 'decimal' | 'bytes';

export interface Table<Row extends object> {
  readonly name: string;
  readonly columns: { readonly [K in keyof Row]-?: ColumnKind };
  readonly keys: readonly (keyof Row & string)[];
}

/** Names a table's columns once; models, inserts and updates are made from it. `keys` default to `id`. */
export function table<Row extends object>(
  name: string,
  columns: { readonly [K in keyof Row]-?: ColumnKind },
  keys: readonly (keyof Row & string)[] = ['id' as keyof Row & string],
): Table<Row> {
  return { name, columns, keys };
}

const types: Record<ColumnKind, () => unknown> = {
  uuid: () => DataTypes.CHAR(36),
  text: () => DataTypes.TEXT,
  int: () => DataTypes.BIGINT,
  flag: () => DataTypes.TINYINT,
  time: () => DataTypes.STRING(27),
  date: () => DataTypes.STRING(10),
  json: () => DataTypes.TEXT('long'),
  decimal: () => DataTypes.STRING(40),
  bytes: () => DataTypes.BLOB('long'),
};

const models = new WeakMap<Sequelize, Map<string, ModelStatic<Model>>>();

function modelOf<Row extends object>(sequelize: Sequelize, shape: Table<Row>): ModelStatic<Model> {
  let known = models.get(sequelize);
  if (!known) models.set(sequelize, (known = new Map<string, ModelStatic<Model>>()));
  let model = known.get(shape.name);
  if (!model) {
    const attributes = Object.fromEntries(
      Object.entries(shape.columns).map(([column, kind]) => [
        column,
        { type: types[kind as ColumnKind]() as never, primaryKey: (shape.keys as readonly string[]).includes(column) },
      ]),
    );
    model = sequelize.define(shape.name, attributes, { tableName: shape.name, timestamps: false });
    known.set(shape.name, model);
  }
  return model;
}

function stored(shape: Table<object>, row: object): Record<string, unknown> {
  const kinds = shape.columns as Record<string, ColumnKind>;
  return Object.fromEntries(
    Object.entries(row)
      .filter(([, value]) => value !== undefined)
      .map(([column, value]) => {
        const kind = kinds[column];
        if (value === null || kind === undefined) return [column, value];
        if (kind === 'time') return [column, sqlTimeOf(value as string)];
        if (kind === 'json') return [column, JSON.stringify(value)];
        if (kind === 'flag') return [column, value ? 1 : 0];
        return [column, value];
      }),
  );
}

interface Within {
  readonly sequelize: Sequelize;
  readonly transaction: Transaction;
}

/** Inserts one row. */
export async function insert<Row extends object>(work: Within, shape: Table<Row>, row: Partial<Row>): Promise<void> {
  await modelOf(work.sequelize, shape).create(stored(shape as unknown as Table<object>, row) as never, {
    transaction: work.transaction,
  });
}

/** Inserts many rows in one statement. */
export async function insertAll<Row extends object>(
  work: Within,
  shape: Table<Row>,
  rows: readonly Partial<Row>[],
): Promise<void> {
  if (rows.length === 0) return;
  const model = modelOf(work.sequelize, shape);
  await model.bulkCreate(rows.map((row) => stored(shape as unknown as Table<object>, row)) as never[], {
    transaction: work.transaction,
  });
}

/** Changes the rows that match `where` (equality only); answers how many changed. */
export async function update<Row extends object>(
  work: Within,
  shape: Table<Row>,
  change: Partial<Row>,
  where: Partial<Row>,
): Promise<number> {
  const plain = shape as unknown as Table<object>;
  const [count] = await modelOf(work.sequelize, shape).update(stored(plain, change) as never, {
    where: stored(plain, where) as never,
    transaction: work.transaction,
  });
  return count;
}
