import { appendOnly } from './append-only-triggers';
import type { Migration } from './migration';

/** A penetrant load, a furnace, leach or coating cycle: one run, many inspections. */
export const runs: Migration = {
  name: '2026-12-01-42-runs',
  statements: [
    // windows = what the values are judged by, copied when the run is entered; the newest row of run_values says what was read.
    `CREATE TABLE runs (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, kind ENUM('penetrant-load','furnace','leach','coating') NOT NULL, technique VARCHAR(40) NOT NULL, technique_issue INT NULL,
      method VARCHAR(40) NOT NULL, line VARCHAR(60) NULL, windows LONGTEXT NOT NULL, acts LONGTEXT NOT NULL, standing ENUM('incomplete','good','void') NOT NULL,
      entered_by UUID NOT NULL, entered_at DATETIME(6) NOT NULL, version INT NOT NULL DEFAULT 0,
      INDEX runs_newest (entered_at, id), INDEX runs_by_technique (technique, entered_at), CONSTRAINT runs_account FOREIGN KEY (entered_by) REFERENCES accounts (id))`,
    `CREATE TABLE run_parts (
      run_id UUID NOT NULL, part_id UUID NOT NULL, place VARCHAR(40) NULL, added_at DATETIME(6) NOT NULL, PRIMARY KEY (run_id, part_id), INDEX runs_of_part (part_id),
      CONSTRAINT run_parts_run FOREIGN KEY (run_id) REFERENCES runs (id), CONSTRAINT run_parts_part FOREIGN KEY (part_id) REFERENCES parts (id))`,
    // Every set of values ever entered, with the reason of a change; the newest counts.
    `CREATE TABLE run_values (
      run_id UUID NOT NULL, seq INT NOT NULL, process LONGTEXT NOT NULL, evaluation LONGTEXT NOT NULL, standing ENUM('incomplete','good','void') NOT NULL, reason VARCHAR(400) NULL,
      entered_by UUID NOT NULL, entered_at DATETIME(6) NOT NULL, PRIMARY KEY (run_id, seq), CONSTRAINT values_run FOREIGN KEY (run_id) REFERENCES runs (id))`,
    // Signed inspections that took their process values from the run.
    `CREATE TABLE run_inspections (
      run_id UUID NOT NULL, inspection_id UUID NOT NULL, part_id UUID NOT NULL, PRIMARY KEY (run_id, inspection_id), INDEX runs_of_inspection (inspection_id),
      CONSTRAINT run_inspections_run FOREIGN KEY (run_id) REFERENCES runs (id), CONSTRAINT run_inspections_inspection FOREIGN KEY (inspection_id) REFERENCES inspections (id))`,
    ...appendOnly('run_values'),
    ...appendOnly('run_inspections'),
  ],
};
