import type { Migration } from './migration';

/** The customer's documents, our numbered readings of them, techniques, equipment and checks. */
export const plans: Migration = {
  name: '2026-12-01-02-plans',
  statements: [
    `CREATE TABLE drawings (
      id UUID PRIMARY KEY, number VARCHAR(60) NOT NULL UNIQUE, title VARCHAR(200) NOT NULL, customer_id UUID NOT NULL,
      export_class VARCHAR(40) NOT NULL DEFAULT 'none', version INT NOT NULL DEFAULT 0, created_at DATETIME(6) NOT NULL,
      CONSTRAINT drawings_customer FOREIGN KEY (customer_id) REFERENCES customers (id))`,
    `CREATE TABLE drawing_revisions (
      id UUID PRIMARY KEY, drawing_id UUID NOT NULL, revision VARCHAR(12) NOT NULL, note VARCHAR(400) NULL, created_at DATETIME(6) NOT NULL,
      UNIQUE KEY drawing_revision (drawing_id, revision), CONSTRAINT revisions_drawing FOREIGN KEY (drawing_id) REFERENCES drawings (id))`,
    // content = {views, criteria, route, rework, effectivity}, canonical JSON; an approved row never changes (trigger).
    `CREATE TABLE plan_issues (
      id UUID PRIMARY KEY, drawing_revision_id UUID NOT NULL, issue INT NOT NULL,
      state ENUM('draft','checked','approved','superseded','withdrawn-for-error') NOT NULL, content LONGTEXT NOT NULL, content_digest CHAR(64) CHARACTER SET ascii NOT NULL,
      prepared_by UUID NOT NULL, prepared_at DATETIME(6) NOT NULL, checked_by UUID NULL, checked_at DATETIME(6) NULL,
      approved_by UUID NULL, approved_at DATETIME(6) NULL, ended_by UUID NULL, ended_at DATETIME(6) NULL, ended_reason VARCHAR(400) NULL,
      version INT NOT NULL DEFAULT 0,
      UNIQUE KEY plan_issue (drawing_revision_id, issue), CONSTRAINT plans_revision FOREIGN KEY (drawing_revision_id) REFERENCES drawing_revisions (id))`,
    // The route of an approved issue, one row per requirement, in order.
    `CREATE TABLE requirements (
      id UUID PRIMARY KEY, plan_issue_id UUID NOT NULL, position INT NOT NULL, \`key\` VARCHAR(60) NOT NULL, operation VARCHAR(12) NOT NULL,
      title VARCHAR(160) NOT NULL, method VARCHAR(40) NOT NULL, technique VARCHAR(40) NULL, content LONGTEXT NOT NULL,
      UNIQUE KEY requirement_key (plan_issue_id, \`key\`), UNIQUE KEY requirement_position (plan_issue_id, position),
      CONSTRAINT requirements_plan FOREIGN KEY (plan_issue_id) REFERENCES plan_issues (id))`,
    `CREATE TABLE technique_issues (
      id UUID PRIMARY KEY, number VARCHAR(40) NOT NULL, issue INT NOT NULL, method VARCHAR(40) NOT NULL, title VARCHAR(200) NOT NULL,
      standard VARCHAR(200) NOT NULL, state ENUM('draft','checked','approved','superseded','withdrawn-for-error') NOT NULL, content LONGTEXT NOT NULL,
      customer_approval VARCHAR(120) NULL, author UUID NOT NULL, created_at DATETIME(6) NOT NULL, approved_by UUID NULL, approved_at DATETIME(6) NULL,
      version INT NOT NULL DEFAULT 0, UNIQUE KEY technique_issue (number, issue), INDEX techniques_by_method (method, state))`,
    `CREATE TABLE equipment (
      id UUID PRIMARY KEY, number VARCHAR(40) NOT NULL UNIQUE, title VARCHAR(160) NOT NULL, kind VARCHAR(60) NOT NULL, method VARCHAR(40) NOT NULL,
      location VARCHAR(80) NULL, version INT NOT NULL DEFAULT 0, retired_at DATETIME(6) NULL, created_at DATETIME(6) NOT NULL, INDEX equipment_by_method (method, number))`,
    `CREATE TABLE calibrations (
      id UUID PRIMARY KEY, equipment_id UUID NOT NULL, \`function\` VARCHAR(80) NOT NULL, range_lower VARCHAR(36) NULL, range_upper VARCHAR(36) NULL, range_unit VARCHAR(12) NULL,
      as_found ENUM('good','failed','not-taken') NOT NULL, as_left ENUM('good','failed') NOT NULL, bias VARCHAR(36) NULL,
      calibrated_on DATE NOT NULL, due_on DATE NOT NULL, certificate VARCHAR(80) NULL, recorded_by UUID NOT NULL, created_at DATETIME(6) NOT NULL,
      INDEX calibrations_by_equipment (equipment_id, calibrated_on), CONSTRAINT calibrations_equipment FOREIGN KEY (equipment_id) REFERENCES equipment (id))`,
    // Uncertainty belongs to technique x characteristic x gauge type, not to the gauge.
    `CREATE TABLE measurement_processes (
      id UUID PRIMARY KEY, technique VARCHAR(40) NOT NULL, characteristic VARCHAR(60) NOT NULL, gauge_kind VARCHAR(60) NOT NULL,
      expanded VARCHAR(36) NOT NULL, k VARCHAR(36) NOT NULL, unit VARCHAR(20) NOT NULL, basis VARCHAR(200) NOT NULL, valid_from DATE NOT NULL, created_at DATETIME(6) NOT NULL,
      UNIQUE KEY measurement_process (technique, characteristic, gauge_kind, valid_from))`,
    `CREATE TABLE process_checks (
      id UUID PRIMARY KEY, scope VARCHAR(60) NOT NULL, method VARCHAR(40) NOT NULL, title VARCHAR(160) NOT NULL, kind ENUM('opening','bracketing') NOT NULL,
      result ENUM('good','failed') NOT NULL, value VARCHAR(36) NULL, unit VARCHAR(20) NULL, note VARCHAR(400) NULL,
      at DATETIME(6) NOT NULL, valid_until DATETIME(6) NOT NULL, done_by UUID NOT NULL, created_at DATETIME(6) NOT NULL,
      INDEX checks_by_scope (scope, at), INDEX checks_by_method (method, at))`,
  ],
};
