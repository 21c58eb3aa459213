import { QueryTypes, type Sequelize } from 'sequelize';
import { appendOnlyTables, laterAppendOnlyTables } from './append-only';

/**
 * Gives the application's user what it needs and no more: SELECT and INSERT everywhere,
 * UPDATE and DELETE only where rows are not signed records. Run by the owner after each migration.
 */
export async function grantToApplication(
  owner: Sequelize,
  application: { user: string; host: string; schema: string },
): Promise<void> {
  const grantee = `'${application.user.replace(/'/g, '')}'@'${application.host}'`;
  const tables = await owner.query<{ name: string }>(
    `SELECT table_name AS name FROM information_schema.tables WHERE table_schema = ? AND table_type = 'BASE TABLE'`,
    { type: QueryTypes.SELECT, replacements: [application.schema] },
  );
  const fixed = new Set<string>([...appendOnlyTables, ...laterAppendOnlyTables, 'schema_migrations']);
  for (const { name } of tables) {
    const rights =
      name === 'schema_migrations' ? 'SELECT' : fixed.has(name) ? 'SELECT, INSERT' : 'SELECT, INSERT, UPDATE, DELETE';
    await owner.query(`GRANT ${rights} ON \`${application.schema}\`.\`${name}\` TO ${grantee}`);
  }
}
