import type { Migration } from './migration';

/** A scope has several checks (panel, lamp, light): each is looked up by itself, however many years are on record. */
export const checksByTitle: Migration = {
  name: '2026-12-01-26-checks-by-title',
  statements: ['CREATE INDEX checks_by_title ON process_checks (scope, title, at)'],
};
