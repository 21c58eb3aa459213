import type { Migration } from './migration';

/** Registered workstations, the badges people carry, and who sits where. */
export const workstations: Migration = {
  name: '2026-12-01-40-workstations',
  statements: [
    // The browser keeps the token in a cookie; here is only its SHA-256, so that a stolen table makes no workstation.
    `CREATE TABLE workstations (
      id UUID PRIMARY KEY, name VARCHAR(60) NOT NULL UNIQUE, place VARCHAR(80) NULL, scan_prefix VARCHAR(12) NOT NULL, token_digest CHAR(64) CHARACTER SET ascii NOT NULL UNIQUE,
      registered_by UUID NOT NULL, registered_at DATETIME(6) NOT NULL, retired_by UUID NULL, retired_at DATETIME(6) NULL, version INT NOT NULL DEFAULT 0,
      CONSTRAINT workstations_account FOREIGN KEY (registered_by) REFERENCES accounts (id))`,
    // A badge's text is kept as its SHA-256; one person may carry several over time, one at a time.
    `CREATE TABLE badges (
      digest CHAR(64) CHARACTER SET ascii PRIMARY KEY, account_id UUID NOT NULL, issued_by UUID NOT NULL, issued_at DATETIME(6) NOT NULL, withdrawn_at DATETIME(6) NULL,
      INDEX badges_by_account (account_id, withdrawn_at), CONSTRAINT badges_account FOREIGN KEY (account_id) REFERENCES accounts (id))`,
    // One sitting for each session: what a PIN counts for while the person keeps working.
    `CREATE TABLE sittings (
      id UUID PRIMARY KEY, session_id VARCHAR(128) CHARACTER SET ascii COLLATE ascii_bin NOT NULL UNIQUE, account_id UUID NOT NULL, workstation_id UUID NULL,
      proven_by ENUM('password','badge') NOT NULL, opened_at DATETIME(6) NOT NULL, last_act_at DATETIME(6) NOT NULL, ended_at DATETIME(6) NULL, ended_reason ENUM('another-person','signed-out') NULL,
      INDEX sittings_at_workstation (workstation_id, ended_at), INDEX sittings_by_account (account_id, opened_at),
      CONSTRAINT sittings_account FOREIGN KEY (account_id) REFERENCES accounts (id), CONSTRAINT sittings_workstation FOREIGN KEY (workstation_id) REFERENCES workstations (id))`,
    // Whoever is signed in while this is installed keeps on signing.
    `INSERT INTO sittings (id, session_id, account_id, proven_by, opened_at, last_act_at)
      SELECT UUID(), id, user_id, 'password', created_at, UTC_TIMESTAMP(6) FROM sessions`,
  ],
};
