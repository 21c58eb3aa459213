import type { Migration } from './migration';

/** Plant, accounts, sessions, and the rows that say what a person's work counts as. */
export const people: Migration = {
  name: '2026-12-01-01-people',
  statements: [
    `CREATE TABLE plants (
      id UUID PRIMARY KEY, code VARCHAR(12) NOT NULL UNIQUE, name VARCHAR(120) NOT NULL, address VARCHAR(400) NOT NULL,
      zone VARCHAR(60) NOT NULL, locale CHAR(2) NOT NULL)`,
    `CREATE TABLE customers (
      id UUID PRIMARY KEY, code VARCHAR(20) NOT NULL UNIQUE, name VARCHAR(120) NOT NULL, address VARCHAR(400) NOT NULL,
      locale CHAR(2) NOT NULL DEFAULT 'en', quality_email VARCHAR(200) NOT NULL, version INT NOT NULL DEFAULT 0, created_at DATETIME(6) NOT NULL)`,
    `CREATE TABLE accounts (
      id UUID PRIMARY KEY, email VARCHAR(200) NOT NULL UNIQUE, name VARCHAR(120) NOT NULL,
      role ENUM('inspector','reviewer','customer-quality','auditor','administrator') NOT NULL,
      release_authority TINYINT NOT NULL DEFAULT 0, customer_id UUID NULL, access_until DATETIME(6) NULL,
      password_hash VARCHAR(200) NOT NULL, pin_hash VARCHAR(200) NULL, pin_failures INT NOT NULL DEFAULT 0, locale CHAR(2) NOT NULL DEFAULT 'en',
      disabled_at DATETIME(6) NULL, version INT NOT NULL DEFAULT 0, created_at DATETIME(6) NOT NULL,
      CONSTRAINT accounts_customer FOREIGN KEY (customer_id) REFERENCES customers (id))`,
    // lucia's adapter reads and writes this table; ids are SHA-256 of the cookie's value.
    `CREATE TABLE sessions (
      id VARCHAR(128) CHARACTER SET ascii COLLATE ascii_bin PRIMARY KEY, user_id UUID NOT NULL, expires_at DATETIME NOT NULL,
      created_at DATETIME(6) NOT NULL, address VARCHAR(64) NOT NULL, agent VARCHAR(200) NOT NULL,
      INDEX sessions_by_user (user_id), CONSTRAINT sessions_account FOREIGN KEY (user_id) REFERENCES accounts (id))`,
    `CREATE TABLE sign_ins (
      id UUID PRIMARY KEY, account_id UUID NULL, email_digest CHAR(64) CHARACTER SET ascii NOT NULL, address VARCHAR(64) NOT NULL,
      outcome ENUM('signed-in','refused','limited') NOT NULL, at DATETIME(6) NOT NULL,
      INDEX sign_ins_by_account (account_id, at), INDEX sign_ins_by_email (email_digest, at), INDEX sign_ins_by_address (address, at))`,
    `CREATE TABLE authorisations (
      id UUID PRIMARY KEY, account_id UUID NOT NULL, method VARCHAR(40) NOT NULL, technique VARCHAR(40) NULL,
      level ENUM('trainee','1','1-limited','2','3') NOT NULL, products VARCHAR(200) NULL, valid_from DATE NOT NULL, valid_to DATE NOT NULL,
      granted_by UUID NULL, granted_at DATETIME(6) NULL, withdrawn_at DATETIME(6) NULL, withdrawn_reason VARCHAR(400) NULL,
      prepared_by UUID NULL, created_at DATETIME(6) NOT NULL,
      INDEX authorisations_by_account (account_id, method, valid_to), CONSTRAINT authorisations_account FOREIGN KEY (account_id) REFERENCES accounts (id))`,
    `CREATE TABLE vision_tests (
      id UUID PRIMARY KEY, account_id UUID NOT NULL, test ENUM('near-vision','colour-perception') NOT NULL, result ENUM('pass','fail') NOT NULL,
      corrected TINYINT NOT NULL DEFAULT 0, tested_on DATE NOT NULL, recorded_by UUID NULL, created_at DATETIME(6) NOT NULL,
      INDEX vision_by_account (account_id, test, tested_on), CONSTRAINT vision_account FOREIGN KEY (account_id) REFERENCES accounts (id))`,
    `CREATE TABLE machine_tokens (
      id UUID PRIMARY KEY, name VARCHAR(120) NOT NULL, token_digest CHAR(64) CHARACTER SET ascii NOT NULL UNIQUE, calls LONGTEXT NOT NULL,
      made_by UUID NOT NULL, created_at DATETIME(6) NOT NULL, revoked_at DATETIME(6) NULL)`,
  ],
};
