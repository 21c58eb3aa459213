import * as accounts from '@/services/contracts/accounts';
import * as baskets from '@/services/contracts/baskets';
import * as certificates from '@/services/contracts/certificates';
import * as checks from '@/services/contracts/checks';
import * as equipment from '@/services/contracts/equipment';
import * as evaluate from '@/services/contracts/evaluate';
import * as evidence from '@/services/contracts/evidence';
import * as findings from '@/services/contracts/findings';
import * as health from '@/services/contracts/health';
import * as inspections from '@/services/contracts/inspections';
import * as openapi from '@/services/contracts/openapi';
import * as jobs from '@/services/contracts/jobs';
import type { Operation } from '@/services/contracts/operation';
import * as orders from '@/services/contracts/orders';
import * as parts from '@/services/contracts/parts';
import * as personnel from '@/services/contracts/personnel';
import * as plans from '@/services/contracts/plans';
import * as runs from '@/services/contracts/runs';
import * as session from '@/services/contracts/session';
import * as shipments from '@/services/contracts/shipments';
import * as suspects from '@/services/contracts/suspects';
import * as techniques from '@/services/contracts/techniques';
import * as trace from '@/services/contracts/trace';
import * as workstations from '@/services/contracts/workstations';

/** Every contract module that holds calls; a route whose contract is not here fails tests/routes/openapi.test.ts. */
const modules: readonly object[] = [
  ...[accounts, certificates, evaluate, evidence, findings, health, inspections, jobs, openapi],
  ...[orders, parts, personnel, plans, session, shipments, trace],
  ...[checks, equipment, suspects, techniques],
  ...[baskets, runs, workstations],
];

function isOperation(value: unknown): value is Operation {
  return typeof value === 'object' && value !== null && 'method' in value && 'path' in value && 'changes' in value;
}

/** All calls of the HTTP contract, in order of path and method. */
export const allOperations: readonly Operation[] = modules
  .flatMap((contracts) => Object.values(contracts).filter(isOperation))
  .sort((a, b) => (`${a.path} ${a.method}` < `${b.path} ${b.method}` ? -1 : 1));
