import { QueryTypes, type Sequelize } from 'sequelize';
import { Umzug } from 'umzug';
import { connect } from './connection';
import { grantToApplication } from './grants';
import { allMigrations } from './migrations/all';

function needed(name: string): string {
  const value = process.env[name];
  if (!value) throw new Error(`${name} is not set`);
  return value;
}

function migrator(owner: Sequelize) {
  return new Umzug({
    migrations: allMigrations.map(({ name, statements }) => ({
      name,
      up: async () => {
        for (const statement of statements) await owner.query(statement);
      },
    })),
    storage: {
      logMigration: async ({ name }) => {
        await owner.query('INSERT INTO schema_migrations (name, applied_at) VALUES (?, UTC_TIMESTAMP(6))', {
          replacements: [name],
        });
      },
      unlogMigration: () => Promise.reject(new Error('a migration is never undone; write the next one')),
      executed: async () => {
        const rows = await owner.query<{ name: string }>('SELECT name FROM schema_migrations ORDER BY name', {
          type: QueryTypes.SELECT,
        });
        return rows.map(({ name }) => name);
      },
    },
    logger: undefined,
  });
}

/**
 * Brings the schema to the newest migration, then renews the application's grants. Two at once: the second waits
 * (GET_LOCK on one pinned connection, hence the pool of one). Returns the names applied now.
 */
export async function migrate(ownerAddress: string, applicationAddress: string): Promise<string[]> {
  const owner = connect(ownerAddress, 1, 0);
  try {
    const [lock] = await owner.query<{ got: number | null }>(`SELECT GET_LOCK('ringtrue-migrate', 60) AS got`, {
      type: QueryTypes.SELECT,
    });
    if (lock?.got !== 1) throw new Error('another migration is running and did not end within 60 s');
    await owner.query(
      'CREATE TABLE IF NOT EXISTS schema_migrations (name VARCHAR(120) PRIMARY KEY, applied_at DATETIME(6) NOT NULL)',
    );
    const applied = await migrator(owner).up();
    const application = new URL(applicationAddress);
    const hosts = await owner.query<{ host: string }>(`SELECT SUBSTRING_INDEX(CURRENT_USER(), '@', -1) AS host`, {
      type: QueryTypes.SELECT,
    });
    await grantToApplication(owner, {
      user: decodeURIComponent(application.username),
      host: process.env.RINGTRUE_DATABASE_APP_HOST ?? hosts[0]?.host ?? '%',
      schema: application.pathname.slice(1),
    });
    await owner.query(`SELECT RELEASE_LOCK('ringtrue-migrate')`);
    return applied.map(({ name }) => name);
  } finally {
    await owner.close();
  }
}

if (process.argv[1]?.endsWith('migrate.ts')) {
  const applied = await migrate(needed('RINGTRUE_DATABASE_OWNER_URL'), needed('RINGTRUE_DATABASE_URL'));
  console.log(applied.length === 0 ? 'schema is current' : `applied ${applied.join(', ')}`);
}
