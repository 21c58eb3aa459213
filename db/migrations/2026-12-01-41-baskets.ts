import { appendOnly } from './append-only-triggers';
import type { Migration } from './migration';

/** Many parts, one operation, one evaluator, one signature. */
export const baskets: Migration = {
  name: '2026-12-01-41-baskets',
  statements: [
    `CREATE TABLE baskets (
      id UUID PRIMARY KEY, number VARCHAR(24) NOT NULL UNIQUE, drawing_id UUID NOT NULL, requirement_key VARCHAR(60) NOT NULL, operation VARCHAR(12) NOT NULL, title VARCHAR(160) NOT NULL,
      method VARCHAR(40) NOT NULL, technique VARCHAR(40) NULL, line VARCHAR(60) NULL, run_id UUID NULL, process LONGTEXT NOT NULL, acts LONGTEXT NOT NULL, count_in INT NOT NULL,
      state ENUM('open','signed','closed') NOT NULL DEFAULT 'open', evaluator_id UUID NOT NULL, split_from UUID NULL, opened_by UUID NOT NULL, opened_at DATETIME(6) NOT NULL,
      ended_at DATETIME(6) NULL, version INT NOT NULL DEFAULT 0,
      INDEX baskets_newest (opened_at, id), INDEX baskets_by_state (state, opened_at, id), INDEX baskets_by_evaluator (evaluator_id, state, opened_at), INDEX baskets_split (split_from), INDEX baskets_by_run (run_id),
      CONSTRAINT baskets_drawing FOREIGN KEY (drawing_id) REFERENCES drawings (id), CONSTRAINT baskets_evaluator FOREIGN KEY (evaluator_id) REFERENCES accounts (id))`,
    // live is 1 while the part is in the basket and NULL when taken out, so that it may come back: one live row for each part.
    // draft_version is the draft as the basket wrote it (0 once signed with it); a draft that has moved on was opened to mark.
    `CREATE TABLE basket_parts (
      basket_id UUID NOT NULL, part_id UUID NOT NULL, draft_id UUID NOT NULL, draft_version INT NOT NULL, live TINYINT NULL DEFAULT 1, scan VARCHAR(200) NOT NULL,
      scanned_at DATETIME(6) NOT NULL, out_reason VARCHAR(400) NULL, out_by UUID NULL, out_at DATETIME(6) NULL,
      PRIMARY KEY (basket_id, draft_id), UNIQUE KEY basket_part (basket_id, part_id, live), UNIQUE KEY basket_draft (draft_id), INDEX baskets_of_part (part_id),
      CONSTRAINT basket_parts_basket FOREIGN KEY (basket_id) REFERENCES baskets (id), CONSTRAINT basket_parts_draft FOREIGN KEY (draft_id) REFERENCES inspection_drafts (id))`,
    // record = canonical bytes of what one signature covered: the set-up, and each inspection with its digest.
    `CREATE TABLE basket_signatures (
      basket_id UUID PRIMARY KEY, count INT NOT NULL, sentence VARCHAR(600) NOT NULL, record LONGBLOB NOT NULL, record_digest CHAR(64) CHARACTER SET ascii NOT NULL,
      signed_by UUID NOT NULL, signed_at DATETIME(6) NOT NULL, CONSTRAINT signatures_basket FOREIGN KEY (basket_id) REFERENCES baskets (id))`,
    ...appendOnly('basket_signatures'),
  ],
};
