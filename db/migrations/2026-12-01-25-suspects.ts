import type { Migration } from './migration';

function appendOnly(table: string): string[] {
  return (['UPDATE', 'DELETE'] as const).map(
    (move) => `CREATE TRIGGER ${table}_no_${move.toLowerCase()} BEFORE ${move} ON ${table} FOR EACH ROW
      SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = '${table} is append-only'`,
  );
}

/** What signed acts leaned on, the suspect lists drawn from it, and how techniques and equipment end. */
export const suspects: Migration = {
  name: '2026-12-01-25-suspects',
  statements: [
    // A projection of the signed record: one row per act and thing it leaned on. `day` is the plant's calendar day of the act.
    `CREATE TABLE inspection_leans (
      inspection_id UUID NOT NULL, kind ENUM('equipment','scope','technique') NOT NULL, target VARCHAR(60) NOT NULL, at DATETIME(6) NOT NULL, day DATE NOT NULL,
      PRIMARY KEY (inspection_id, kind, target, at), INDEX leans_on_target (kind, target, at),
      CONSTRAINT leans_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id))`,
    `INSERT IGNORE INTO inspection_leans (inspection_id, kind, target, at, day)
      SELECT i.id, 'equipment', a.equipment, REPLACE(REPLACE(a.at, 'T', ' '), 'Z', ''), DATE(REPLACE(REPLACE(a.at, 'T', ' '), 'Z', '')) FROM inspections i,
        JSON_TABLE(CONVERT(i.record USING utf8mb4), '$.acts[*]' COLUMNS (at VARCHAR(40) PATH '$.at', NESTED PATH '$.equipment[*]' COLUMNS (equipment VARCHAR(60) PATH '$.id'))) a
      WHERE a.at IS NOT NULL AND a.equipment IS NOT NULL`,
    `INSERT IGNORE INTO inspection_leans (inspection_id, kind, target, at, day)
      SELECT i.id, 'scope', a.scope, REPLACE(REPLACE(a.at, 'T', ' '), 'Z', ''), DATE(REPLACE(REPLACE(a.at, 'T', ' '), 'Z', '')) FROM inspections i,
        JSON_TABLE(CONVERT(i.record USING utf8mb4), '$.acts[*]' COLUMNS (at VARCHAR(40) PATH '$.at', NESTED PATH '$.checks[*]' COLUMNS (scope VARCHAR(60) PATH '$.scope'))) a
      WHERE a.at IS NOT NULL AND a.scope IS NOT NULL`,
    `INSERT IGNORE INTO inspection_leans (inspection_id, kind, target, at, day)
      SELECT i.id, 'technique', JSON_VALUE(CONVERT(i.record USING utf8mb4), '$.technique.id'), i.acted_at, DATE(i.acted_at) FROM inspections i
      WHERE JSON_VALUE(CONVERT(i.record USING utf8mb4), '$.technique.id') IS NOT NULL`,
    ...appendOnly('inspection_leans'),
    // One list for each cause; its groups are decided one by one and hold their parts until then.
    `CREATE TABLE suspect_lists (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, cause ENUM('calibration','check','technique') NOT NULL, cause_id UUID NOT NULL UNIQUE, method VARCHAR(40) NOT NULL,
      technique VARCHAR(40) NULL, equipment_id UUID NULL, scope VARCHAR(60) NULL, named VARCHAR(80) NOT NULL, reason VARCHAR(400) NOT NULL, since_at DATETIME(6) NULL, until_at DATETIME(6) NOT NULL,
      opened_by UUID NOT NULL, opened_at DATETIME(6) NOT NULL,
      INDEX suspect_lists_newest (opened_at, id), INDEX suspect_lists_by_equipment (equipment_id), INDEX suspect_lists_by_scope (scope))`,
    `CREATE TABLE suspect_groups (
      id UUID PRIMARY KEY, list_id UUID NOT NULL, requirement_id UUID NOT NULL, gone TINYINT NOT NULL, closed_how ENUM('no-effect','repeat') NULL, closed_reason VARCHAR(400) NULL,
      closed_by UUID NULL, closed_at DATETIME(6) NULL, version INT NOT NULL DEFAULT 0,
      UNIQUE KEY suspect_group (list_id, requirement_id, gone), CONSTRAINT suspect_groups_list FOREIGN KEY (list_id) REFERENCES suspect_lists (id))`,
    `CREATE TABLE suspect_inspections (
      group_id UUID NOT NULL, inspection_id UUID NOT NULL, part_id UUID NOT NULL, rests TINYINT NOT NULL,
      PRIMARY KEY (group_id, inspection_id), INDEX suspects_by_part (part_id, rests), INDEX suspects_by_inspection (inspection_id),
      CONSTRAINT suspects_group FOREIGN KEY (group_id) REFERENCES suspect_groups (id), CONSTRAINT suspects_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id))`,
    ...appendOnly('suspect_inspections'),
    // Written by whoever records a check of a scope, shared by whoever signs an act that leans on it.
    `CREATE TABLE check_scopes (scope VARCHAR(60) PRIMARY KEY, version INT NOT NULL DEFAULT 0)`,
    // Everybody who wrote in a draft: none of them checks or approves it.
    `CREATE TABLE technique_hands (technique_id UUID NOT NULL, account_id UUID NOT NULL, PRIMARY KEY (technique_id, account_id))`,
    `ALTER TABLE technique_issues ADD COLUMN checked_by UUID NULL, ADD COLUMN checked_at DATETIME(6) NULL, ADD COLUMN ended_by UUID NULL,
      ADD COLUMN ended_at DATETIME(6) NULL, ADD COLUMN ended_reason VARCHAR(400) NULL`,
    `CREATE TRIGGER technique_issues_frozen BEFORE UPDATE ON technique_issues FOR EACH ROW
      IF OLD.state <> 'draft' AND (NEW.content <> OLD.content OR NEW.number <> OLD.number OR NEW.issue <> OLD.issue OR NEW.method <> OLD.method OR NEW.title <> OLD.title OR NEW.standard <> OLD.standard) THEN
        SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'a checked or approved technique issue never changes';
      END IF`,
    `CREATE TRIGGER technique_issues_kept BEFORE DELETE ON technique_issues FOR EACH ROW
      IF OLD.state <> 'draft' THEN SIGNAL SQLSTATE '45000' SET MESSAGE_TEXT = 'a checked or approved technique issue is never deleted'; END IF`,
    `ALTER TABLE equipment ADD COLUMN retired_by UUID NULL, ADD COLUMN retired_reason VARCHAR(400) NULL`,
  ],
};
