import mariadb, { type ConnectionConfig } from 'mariadb';

type Rows = unknown[] & { meta?: unknown };

interface Queryable {
  query: (...args: unknown[]) => Promise<unknown>;
}

/**
 * Sequelize deletes `meta` from the connector's rows, where connector 3.5 makes it undeletable:
 * every raw SELECT would throw. Handing out a plain copy of the array cures it.
 */
function plainRows(result: unknown): unknown {
  if (!Array.isArray(result)) return result;
  const rows: Rows = result.slice();
  return rows;
}

function wrapConnection<T extends object>(connection: T): T {
  const inner = connection as T & Queryable;
  const query = inner.query.bind(inner);
  inner.query = async (...args: unknown[]) => plainRows(await query(...args));
  return inner;
}

/** The connector as Sequelize's `dialectModule`, with the result rows made plain. */
export const dialectModule = {
  ...mariadb,
  createConnection: async (options: ConnectionConfig) => wrapConnection(await mariadb.createConnection(options)),
};
