import { people } from './2026-12-01-01-people';
import { plans } from './2026-12-01-02-plans';
import { partsAndLots } from './2026-12-01-03-parts';
import { inspections } from './2026-12-01-04-inspections';
import { release } from './2026-12-01-05-release';
import { record } from './2026-12-01-06-record';
import { guards } from './2026-12-01-07-guards';
import { suspects } from './2026-12-01-25-suspects';
import { checksByTitle } from './2026-12-01-26-checks-by-title';
import { workstations } from './2026-12-01-40-workstations';
import { baskets } from './2026-12-01-41-baskets';
import { runs } from './2026-12-01-42-runs';
import type { Migration } from './migration';

/** Every migration in the order it is applied. */
export const allMigrations: readonly Migration[] = [
  people,
  plans,
  partsAndLots,
  inspections,
  release,
  record,
  guards,
  suspects,
  checksByTitle,
  workstations,
  baskets,
  runs,
];
