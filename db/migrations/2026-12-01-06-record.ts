import type { Migration } from './migration';

/** The journal of every change, the outbox of work after commit, and what makes saves repeatable. */
export const record: Migration = {
  name: '2026-12-01-06-record',
  statements: [
    // body = canonical bytes of {id, at, actor, kind, subject, details, nonce}; digest = SHA-256 of body; leaves of the record log.
    `CREATE TABLE events (
      seq BIGINT NOT NULL AUTO_INCREMENT PRIMARY KEY, id UUID NOT NULL UNIQUE, at DATETIME(6) NOT NULL, actor_id UUID NULL, kind VARCHAR(60) NOT NULL,
      subject_kind VARCHAR(40) NOT NULL, subject_id VARCHAR(64) NOT NULL, body LONGBLOB NOT NULL, digest CHAR(64) CHARACTER SET ascii NOT NULL,
      INDEX events_by_subject (subject_kind, subject_id, seq), INDEX events_by_actor (actor_id, seq), INDEX events_by_kind (kind, seq))`,
    `CREATE TABLE event_subjects (subject_kind VARCHAR(40) NOT NULL, subject_id VARCHAR(64) NOT NULL, event_seq BIGINT NOT NULL, PRIMARY KEY (subject_kind, subject_id, event_seq))`,
    `CREATE TABLE jobs (
      id UUID PRIMARY KEY, kind VARCHAR(60) NOT NULL, payload LONGTEXT NOT NULL, state ENUM('waiting','running','done','failed','cancelled') NOT NULL DEFAULT 'waiting', attempts INT NOT NULL DEFAULT 0,
      progress INT NOT NULL DEFAULT 0, result LONGTEXT NULL, last_error VARCHAR(1000) NULL, run_after DATETIME(6) NOT NULL, started_at DATETIME(6) NULL, finished_at DATETIME(6) NULL, asked_by UUID NULL, created_at DATETIME(6) NOT NULL,
      unique_key VARCHAR(120) NULL UNIQUE, INDEX jobs_due (state, run_after))`,
    `CREATE TABLE mails (
      id UUID PRIMARY KEY, recipient VARCHAR(200) NOT NULL, subject VARCHAR(300) NOT NULL, template VARCHAR(60) NOT NULL, state ENUM('queued','sent','failed') NOT NULL, sent_at DATETIME(6) NULL, created_at DATETIME(6) NOT NULL)`,
    `CREATE TABLE idempotency_keys (
      account_id UUID NOT NULL, request_key VARCHAR(100) NOT NULL, call_name VARCHAR(100) NOT NULL, body_digest CHAR(64) CHARACTER SET ascii NOT NULL, status INT NULL, answer LONGTEXT NULL, created_at DATETIME(6) NOT NULL,
      PRIMARY KEY (account_id, request_key))`,
    `CREATE TABLE counters (name VARCHAR(40) NOT NULL, year SMALLINT NOT NULL, value INT NOT NULL, PRIMARY KEY (name, year))`,
  ],
};
