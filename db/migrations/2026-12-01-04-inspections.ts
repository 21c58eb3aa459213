import type { Migration } from './migration';

/** Drafts live in tables of their own; signed inspections are appended, never changed. */
export const inspections: Migration = {
  name: '2026-12-01-04-inspections',
  statements: [
    `CREATE TABLE inspection_drafts (
      id UUID PRIMARY KEY, part_id UUID NOT NULL, requirement_id UUID NOT NULL, cycle INT NOT NULL, state ENUM('draft','signed','abandoned') NOT NULL DEFAULT 'draft',
      live TINYINT NULL DEFAULT 1, content LONGTEXT NOT NULL, shown_reject TINYINT NOT NULL DEFAULT 0, repeat_reason VARCHAR(40) NULL, supersedes UUID NULL,
      opened_by UUID NOT NULL, opened_at DATETIME(6) NOT NULL, changed_by UUID NOT NULL, changed_at DATETIME(6) NOT NULL, version INT NOT NULL DEFAULT 1,
      UNIQUE KEY one_live_draft (part_id, requirement_id, live), INDEX drafts_by_person (opened_by, state, changed_at),
      CONSTRAINT drafts_part FOREIGN KEY (part_id) REFERENCES parts (id), CONSTRAINT drafts_requirement FOREIGN KEY (requirement_id) REFERENCES requirements (id))`,
    // A value changed after its verdict was shown keeps what it was.
    `CREATE TABLE draft_changes (
      draft_id UUID NOT NULL, seq INT NOT NULL AUTO_INCREMENT, field VARCHAR(120) NOT NULL, before_value LONGTEXT NULL, verdict_shown VARCHAR(20) NOT NULL,
      changed_by UUID NOT NULL, changed_at DATETIME(6) NOT NULL, PRIMARY KEY (seq), INDEX changes_by_draft (draft_id, seq))`,
    `CREATE TABLE evidence (
      id UUID PRIMARY KEY, sha256 CHAR(64) CHARACTER SET ascii NOT NULL UNIQUE, bytes BIGINT NOT NULL, media_type VARCHAR(100) NOT NULL, name VARCHAR(200) NOT NULL,
      kind VARCHAR(40) NOT NULL, width INT NULL, height INT NULL, bits INT NULL, pixel_pitch_um VARCHAR(36) NULL, facts LONGTEXT NOT NULL, storage_key VARCHAR(200) NOT NULL,
      preview_key VARCHAR(200) NULL, packed_key VARCHAR(200) NULL, admitted_by UUID NOT NULL, admitted_at DATETIME(6) NOT NULL)`,
    `CREATE TABLE evidence_checks (evidence_id UUID NOT NULL, at DATETIME(6) NOT NULL, outcome ENUM('good','missing','altered') NOT NULL, PRIMARY KEY (evidence_id, at))`,
    // Links a file to an inspection (draft and signed share the id).
    `CREATE TABLE inspection_evidence (
      inspection_id UUID NOT NULL, evidence_id UUID NOT NULL, role VARCHAR(40) NOT NULL, view VARCHAR(60) NULL, registration LONGTEXT NULL, linked_by UUID NOT NULL, linked_at DATETIME(6) NOT NULL,
      PRIMARY KEY (inspection_id, evidence_id), INDEX inspections_by_evidence (evidence_id), CONSTRAINT links_evidence FOREIGN KEY (evidence_id) REFERENCES evidence (id))`,
    // record = the canonical bytes that were signed; the other columns and tables are its projection.
    `CREATE TABLE inspections (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, part_id UUID NOT NULL, requirement_id UUID NOT NULL, cycle INT NOT NULL, plan_issue_id UUID NOT NULL, method VARCHAR(40) NOT NULL,
      technique VARCHAR(40) NULL, verdict ENUM('accept','reject','indeterminate','not-evaluable') NOT NULL, reading_count INT NOT NULL, indication_count INT NOT NULL,
      engine VARCHAR(20) NOT NULL, criteria_digest CHAR(71) CHARACTER SET ascii NOT NULL, input_digest CHAR(71) CHARACTER SET ascii NOT NULL,
      record LONGBLOB NOT NULL, record_digest CHAR(64) CHARACTER SET ascii NOT NULL, sentence VARCHAR(600) NOT NULL, late_entry TINYINT NOT NULL DEFAULT 0,
      repeat_reason VARCHAR(40) NULL, supersedes UUID NULL, signed_by UUID NOT NULL, acted_at DATETIME(6) NOT NULL, entered_at DATETIME(6) NOT NULL, signed_at DATETIME(6) NOT NULL,
      INDEX inspections_by_part (part_id, signed_at), INDEX inspections_by_signer (signed_by, signed_at), INDEX inspections_newest (signed_at, id),
      CONSTRAINT inspections_part FOREIGN KEY (part_id) REFERENCES parts (id))`,
    `CREATE TABLE inspection_ends (
      inspection_id UUID PRIMARY KEY, kind ENUM('superseded','voided') NOT NULL, successor_id UUID NULL, reason VARCHAR(400) NOT NULL, ended_by UUID NOT NULL, ended_at DATETIME(6) NOT NULL,
      CONSTRAINT ends_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id))`,
    // value in the characteristic's unit; decimals = digits recorded after the point, so that 0.10 stays 0.10.
    `CREATE TABLE inspection_readings (
      inspection_id UUID NOT NULL, seq SMALLINT UNSIGNED NOT NULL, characteristic VARCHAR(24) CHARACTER SET ascii NOT NULL, value DECIMAL(26,10) NOT NULL, decimals TINYINT NOT NULL,
      unit VARCHAR(20) NOT NULL, verdict ENUM('accept','reject','indeterminate','not-evaluable') NOT NULL, PRIMARY KEY (inspection_id, seq),
      CONSTRAINT readings_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id))`,
    `CREATE TABLE inspection_indications (
      inspection_id UUID NOT NULL, seq SMALLINT UNSIGNED NOT NULL, label VARCHAR(40) NOT NULL, type VARCHAR(40) NOT NULL, view VARCHAR(60) NULL, length_mm DECIMAL(14,6) NULL, width_mm DECIMAL(14,6) NULL,
      class VARCHAR(12) NULL, zones VARCHAR(120) NOT NULL, relevant TINYINT NOT NULL, shape LONGTEXT NULL, verdict ENUM('accept','reject','indeterminate','not-evaluable','not-judged') NOT NULL,
      PRIMARY KEY (inspection_id, seq), CONSTRAINT indications_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id))`,
    `CREATE TABLE inspection_equipment (
      inspection_id UUID NOT NULL, equipment_id UUID NOT NULL, PRIMARY KEY (inspection_id, equipment_id), INDEX inspections_by_equipment (equipment_id),
      CONSTRAINT uses_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id), CONSTRAINT uses_equipment FOREIGN KEY (equipment_id) REFERENCES equipment (id))`,
  ],
};
