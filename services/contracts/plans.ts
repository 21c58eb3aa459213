import { z } from 'zod';
import { id, mark, page, pageQuery, password, words } from './common';
import { operation } from './operation';
import { plan, planContent, planState } from './plan-content';

const drawingNumber = z.object({ number: z.string().min(1).max(60) });
const byId = z.object({ id });

export const drawing = z.object({
  id,
  number: z.string(),
  title: z.string(),
  customer: z.object({ id, code: z.string(), name: z.string() }),
  revisions: z.array(z.object({ id, revision: z.string(), plans: z.array(z.object({ id, issue: z.int(), state: planState })) })),
});
export type Drawing = z.output<typeof drawing>;

export const listDrawings = operation({
  name: 'list-drawings',
  method: 'GET',
  path: '/api/drawings',
  summary: 'Drawings with revisions and plan issues.',
  changes: false,
  query: pageQuery,
  response: page(drawing),
  status: 200,
});

export const createDrawing = operation({
  name: 'create-drawing',
  method: 'POST',
  path: '/api/drawings',
  summary: 'Enter a customer drawing, or a further revision of one.',
  changes: true,
  body: z.strictObject({ number: mark, title: words(200), revision: mark, customer: z.string().min(1).max(60) }),
  response: drawing,
  status: 201,
});

export const listPlans = operation({
  name: 'list-plans',
  method: 'GET',
  path: '/api/drawings/{number}/plans',
  summary: 'Plan issues of a drawing.',
  changes: false,
  params: drawingNumber,
  response: z.object({ items: z.array(plan), next: z.null() }),
  status: 200,
});

export const draftPlan = operation({
  name: 'draft-plan',
  method: 'POST',
  path: '/api/drawings/{number}/plans',
  summary: 'Start a plan issue as a draft.',
  changes: true,
  params: drawingNumber,
  body: planContent.extend({ revision: mark.optional() }),
  response: plan,
  status: 201,
});

export const readPlan = operation({
  name: 'read-plan',
  method: 'GET',
  path: '/api/plans/{id}',
  summary: 'One plan issue; ETag is its version.',
  changes: false,
  params: byId,
  response: plan,
  status: 200,
});

export const changePlan = operation({
  name: 'change-plan',
  method: 'PUT',
  path: '/api/plans/{id}',
  summary: 'Replace the content of a draft; needs If-Match.',
  changes: true,
  params: byId,
  body: planContent,
  response: plan,
  status: 200,
});

export const checkPlan = operation({
  name: 'check-plan',
  method: 'POST',
  path: '/api/plans/{id}/check',
  summary: 'A second person has checked the draft; every fault at once otherwise.',
  changes: true,
  params: byId,
  body: z.strictObject({}),
  response: plan,
  status: 200,
});

export const approvePlan = operation({
  name: 'approve-plan',
  method: 'POST',
  path: '/api/plans/{id}/approval',
  summary: 'Approve a checked plan issue; it never changes afterwards.',
  changes: true,
  params: byId,
  body: z.strictObject({ password }),
  response: plan,
  status: 200,
});

export const withdrawPlan = operation({
  name: 'withdraw-plan',
  method: 'POST',
  path: '/api/plans/{id}/withdrawal',
  summary: 'Withdraw an issue for error.',
  changes: true,
  params: byId,
  body: z.strictObject({ password, reason: words(400, 5) }),
  response: plan,
  status: 200,
});

export const fault = z.object({ path: z.string(), message: z.string() });

export const readPlanFaults = operation({
  name: 'read-plan-faults',
  method: 'GET',
  path: '/api/plans/{id}/faults',
  summary: 'What still stands against checking and approving, all at once.',
  changes: false,
  params: byId,
  response: z.object({ faults: z.array(fault) }),
  status: 200,
});
