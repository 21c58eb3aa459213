import { appendOnlyTables } from '../append-only';
import type { Migration } from './migration';

function refuse(table: string, move: 'UPDATE' | 'DELETE'): string {
  return `CREATE TRIGGER ${table}_no_${move.toLowerCase()} BEFORE ${move} ON ${table} FOR EACH ROW
    SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${table} is append-only'`;
}

/** Triggers stop whoever holds more rights than the application; grants (db/grants.ts) stop the application itself. */
export const guards: Migration = {
  name: '2026-12-01-07-guards',
  statements: [
    ...appendOnlyTables.flatMap((table) => [refuse(table, 'UPDATE'), refuse(table, 'DELETE')]),
    `CREATE TRIGGER plan_issues_frozen BEFORE UPDATE ON plan_issues FOR EACH ROW
      IF OLD.state <> 'draft' AND (NEW.content <> OLD.content OR NEW.content_digest <> OLD.content_digest OR NEW.issue <> OLD.issue OR NEW.drawing_revision_id <> OLD.drawing_revision_id) THEN
        SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'a checked or approved plan issue never changes';
      END IF`,
    `CREATE TRIGGER plan_issues_kept BEFORE DELETE ON plan_issues FOR EACH ROW
      IF OLD.state <> 'draft' THEN SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'a checked or approved plan issue is never deleted'; END IF`,
  ],
};
