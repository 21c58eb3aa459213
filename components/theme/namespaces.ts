/**
 * One line for each feature that has words. The name given here is its namespace:
 * `export { messages as parts } from '@/components/parts/messages';`
 */
export { messages as forms } from '@/components/forms/messages';
export { messages as grids } from '@/components/grids/messages';
export { messages as shell } from '@/components/shell/messages';
export { messages as ui } from '@/components/ui/messages';
export { messages as viewer } from '@/components/viewer/messages';
export { messages as accounts } from '@/components/accounts/messages';
export { messages as parts } from '@/components/parts/messages';
export { messages as inspections } from '@/components/inspections/messages';
export { messages as evidence } from '@/components/evidence/messages';
export { messages as certificates } from '@/components/certificates/messages';
export { messages as findings } from '@/components/findings/messages';
export { messages as shipments } from '@/components/shipments/messages';
export { messages as today } from '@/components/today/messages';
export { messages as trace } from '@/components/trace/messages';
export { messages as verify } from '@/components/verify/messages';
export { messages as personnel } from '@/components/personnel/messages';
export { messages as lots } from '@/components/lots/messages';
export { messages as holds } from '@/components/holds/messages';
export { messages as orders } from '@/components/orders/messages';
export { messages as customers } from '@/components/customers/messages';
export { messages as plans } from '@/components/plans/messages';
export { messages as record } from '@/components/record/messages';
export { messages as equipment } from '@/components/equipment/messages';
export { messages as suspects } from '@/components/suspects/messages';
export { messages as checks } from '@/components/checks/messages';
export { messages as techniques } from '@/components/techniques/messages';
export { messages as scanner } from '@/components/scanner/messages';
export { messages as baskets } from '@/components/baskets/messages';
export { messages as runs } from '@/components/runs/messages';
export { messages as workstations } from '@/components/workstations/messages';
