import type { Migration } from './migration';

/** What was bought, the lots castings come from, the castings, and what the plan demands of each. */
export const partsAndLots: Migration = {
  name: '2026-12-01-03-parts',
  statements: [
    `CREATE TABLE orders (
      id UUID PRIMARY KEY, number VARCHAR(20) NOT NULL UNIQUE, customer_id UUID NOT NULL, purchase_order VARCHAR(60) NOT NULL, created_at DATETIME(6) NOT NULL,
      UNIQUE KEY purchase_order (customer_id, purchase_order), CONSTRAINT orders_customer FOREIGN KEY (customer_id) REFERENCES customers (id))`,
    `CREATE TABLE order_lines (
      id UUID PRIMARY KEY, order_id UUID NOT NULL, line INT NOT NULL, drawing_revision_id UUID NOT NULL, quantity INT NOT NULL, released INT NOT NULL DEFAULT 0,
      due_on DATE NULL, clauses LONGTEXT NOT NULL, version INT NOT NULL DEFAULT 0,
      UNIQUE KEY order_line (order_id, line), CONSTRAINT lines_order FOREIGN KEY (order_id) REFERENCES orders (id),
      CONSTRAINT lines_revision FOREIGN KEY (drawing_revision_id) REFERENCES drawing_revisions (id))`,
    `CREATE TABLE lots (
      id UUID PRIMARY KEY, kind ENUM('heat','shell','core','wax','cluster','coating','penetrant-material','furnace-load') NOT NULL, number VARCHAR(40) NOT NULL,
      quantity INT NOT NULL, attributes LONGTEXT NOT NULL, version INT NOT NULL DEFAULT 0, created_by UUID NOT NULL, created_at DATETIME(6) NOT NULL,
      UNIQUE KEY lot_number (kind, number), INDEX lots_newest (created_at, id))`,
    `CREATE TABLE lot_parents (
      lot_id UUID NOT NULL, parent_id UUID NOT NULL, from_at DATETIME(6) NOT NULL, PRIMARY KEY (lot_id, parent_id), INDEX lots_below (parent_id, lot_id),
      CONSTRAINT lot_parents_lot FOREIGN KEY (lot_id) REFERENCES lots (id), CONSTRAINT lot_parents_parent FOREIGN KEY (parent_id) REFERENCES lots (id))`,
    // Counts are kept so that a list of a thousand rings is one query; requirement rows are their truth.
    `CREATE TABLE parts (
      id UUID PRIMARY KEY, drawing_id UUID NOT NULL, serial VARCHAR(40) NOT NULL, plan_issue_id UUID NOT NULL, customer_id UUID NOT NULL, cluster_id UUID NOT NULL,
      position VARCHAR(12) NOT NULL, state ENUM('position','serialised','in-process','finished','released','shipped','returned','scrapped','destroyed','consumed') NOT NULL,
      held TINYINT NOT NULL DEFAULT 0, met_count INT NOT NULL DEFAULT 0, requirement_count INT NOT NULL, next_requirement VARCHAR(160) NULL, open_findings INT NOT NULL DEFAULT 0,
      release_cycle INT NOT NULL DEFAULT 0, version INT NOT NULL DEFAULT 0, created_at DATETIME(6) NOT NULL,
      UNIQUE KEY part_serial (drawing_id, serial), UNIQUE KEY cluster_position (cluster_id, position), INDEX parts_by_serial (serial, id),
      INDEX parts_by_state (state, serial, id), INDEX parts_by_customer (customer_id, serial, id), INDEX parts_by_plan (plan_issue_id),
      CONSTRAINT parts_drawing FOREIGN KEY (drawing_id) REFERENCES drawings (id), CONSTRAINT parts_plan FOREIGN KEY (plan_issue_id) REFERENCES plan_issues (id),
      CONSTRAINT parts_cluster FOREIGN KEY (cluster_id) REFERENCES lots (id), CONSTRAINT parts_customer FOREIGN KEY (customer_id) REFERENCES customers (id))`,
    `CREATE TABLE part_requirements (
      part_id UUID NOT NULL, requirement_id UUID NOT NULL, position INT NOT NULL,
      state ENUM('open','in-work','met','met-by-sample','met-by-ancestor','met-by-outside-certificate','waived','rejected','awaiting-decision','to-be-repeated') NOT NULL DEFAULT 'open',
      inspection_id UUID NULL, cycle INT NOT NULL DEFAULT 1, reason VARCHAR(400) NULL,
      PRIMARY KEY (part_id, position), UNIQUE KEY part_requirement (part_id, requirement_id), INDEX requirements_waiting (requirement_id, state),
      CONSTRAINT part_requirements_part FOREIGN KEY (part_id) REFERENCES parts (id), CONSTRAINT part_requirements_row FOREIGN KEY (requirement_id) REFERENCES requirements (id))`,
    `CREATE TABLE holds (
      id UUID PRIMARY KEY, number VARCHAR(20) NOT NULL UNIQUE, target_kind ENUM('part','lot') NOT NULL, target_id UUID NOT NULL, reason VARCHAR(400) NOT NULL,
      placed_by UUID NOT NULL, placed_at DATETIME(6) NOT NULL, lifted_by UUID NULL, lifted_at DATETIME(6) NULL, lifted_reason VARCHAR(400) NULL, version INT NOT NULL DEFAULT 0,
      INDEX holds_by_target (target_kind, target_id, lifted_at), INDEX holds_newest (placed_at, id))`,
  ],
};
