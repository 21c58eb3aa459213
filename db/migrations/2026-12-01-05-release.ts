import type { Migration } from './migration';

/** Findings and decisions, shipments, signed releases and certificates. */
export const release: Migration = {
  name: '2026-12-01-05-release',
  statements: [
    `CREATE TABLE findings (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, part_id UUID NOT NULL, requirement_id UUID NOT NULL, inspection_id UUID NULL, customer_id UUID NOT NULL,
      state ENUM('open','dispositioned','awaiting-follow-up','closed') NOT NULL, verdict VARCHAR(20) NOT NULL, summary VARCHAR(600) NOT NULL,
      opened_by UUID NOT NULL, opened_at DATETIME(6) NOT NULL, closed_at DATETIME(6) NULL, version INT NOT NULL DEFAULT 0,
      INDEX findings_waiting (state, opened_at, id), INDEX findings_by_part (part_id, state), CONSTRAINT findings_part FOREIGN KEY (part_id) REFERENCES parts (id))`,
    `CREATE TABLE dispositions (
      id UUID PRIMARY KEY, finding_id UUID NOT NULL, seq INT NOT NULL, decision ENUM('re-interpretation','rework','repair','use-as-is','scrap','void','refer','close') NOT NULL,
      reason VARCHAR(1000) NOT NULL, repeat_keys LONGTEXT NOT NULL, scheme VARCHAR(60) NULL, inspection_id UUID NULL, sentence VARCHAR(600) NOT NULL, record LONGBLOB NOT NULL, record_digest CHAR(64) CHARACTER SET ascii NOT NULL,
      decided_by UUID NOT NULL, decided_at DATETIME(6) NOT NULL, UNIQUE KEY disposition_order (finding_id, seq), CONSTRAINT dispositions_finding FOREIGN KEY (finding_id) REFERENCES findings (id))`,
    `CREATE TABLE shipments (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, order_line_id UUID NOT NULL, state ENUM('open','packed','despatched','received','received-with-difference') NOT NULL DEFAULT 'open',
      despatched_at DATETIME(6) NULL, created_by UUID NOT NULL, created_at DATETIME(6) NOT NULL, version INT NOT NULL DEFAULT 0, INDEX shipments_newest (created_at, id),
      CONSTRAINT shipments_line FOREIGN KEY (order_line_id) REFERENCES order_lines (id))`,
    `CREATE TABLE shipment_parts (
      shipment_id UUID NOT NULL, part_id UUID NOT NULL, release_cycle INT NOT NULL, added_by UUID NOT NULL, added_at DATETIME(6) NOT NULL,
      PRIMARY KEY (shipment_id, part_id), UNIQUE KEY one_shipment (part_id, release_cycle), CONSTRAINT shipment_parts_shipment FOREIGN KEY (shipment_id) REFERENCES shipments (id),
      CONSTRAINT shipment_parts_part FOREIGN KEY (part_id) REFERENCES parts (id))`,
    `CREATE TABLE releases (
      id UUID PRIMARY KEY, shipment_id UUID NOT NULL UNIQUE, customer_id UUID NOT NULL, record LONGBLOB NOT NULL, record_digest CHAR(64) CHARACTER SET ascii NOT NULL, sentence VARCHAR(600) NOT NULL,
      signed_by UUID NOT NULL, signed_at DATETIME(6) NOT NULL, CONSTRAINT releases_shipment FOREIGN KEY (shipment_id) REFERENCES shipments (id))`,
    `CREATE TABLE release_parts (
      release_id UUID NOT NULL, part_id UUID NOT NULL, release_cycle INT NOT NULL, PRIMARY KEY (release_id, part_id), UNIQUE KEY released_once (part_id, release_cycle),
      CONSTRAINT release_parts_release FOREIGN KEY (release_id) REFERENCES releases (id), CONSTRAINT release_parts_part FOREIGN KEY (part_id) REFERENCES parts (id))`,
    `CREATE TABLE certificates (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, release_id UUID NOT NULL UNIQUE, customer_id UUID NOT NULL, state ENUM('signed','issued','partly-withdrawn','withdrawn','superseded') NOT NULL,
      check_code VARCHAR(40) CHARACTER SET ascii COLLATE ascii_bin NOT NULL, sha256 CHAR(64) CHARACTER SET ascii NULL UNIQUE, bytes BIGINT NULL, storage_key VARCHAR(200) NULL, issued_at DATETIME(6) NULL, superseded_by UUID NULL,
      signed_at DATETIME(6) NOT NULL, version INT NOT NULL DEFAULT 0, INDEX certificates_by_customer (customer_id, signed_at, id), INDEX certificates_newest (signed_at, id),
      CONSTRAINT certificates_release FOREIGN KEY (release_id) REFERENCES releases (id))`,
    `CREATE TABLE certificate_withdrawals (
      id UUID PRIMARY KEY, certificate_id UUID NOT NULL, part_id UUID NULL, reason VARCHAR(600) NOT NULL, withdrawn_by UUID NOT NULL, withdrawn_at DATETIME(6) NOT NULL, INDEX withdrawals_by_certificate (certificate_id))`,
    `CREATE TABLE certificate_receipts (
      id UUID PRIMARY KEY, certificate_id UUID NOT NULL, kind ENUM('downloaded','acknowledged','received-with-difference') NOT NULL, note VARCHAR(600) NULL, by_account UUID NOT NULL, at DATETIME(6) NOT NULL,
      INDEX receipts_by_certificate (certificate_id, at))`,
  ],
};
