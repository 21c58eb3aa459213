import { z } from 'zod';
import { day, id, instant, method, page, pageQuery, password, words } from './common';
import { operation } from './operation';

const person = z.object({ id, name: z.string() });

/** Levels of EN 4179 and NAS 410 (from memory). */
export const level = z.enum(['trainee', '1', '1-limited', '2', '3']);
export type Level = z.output<typeof level>;

/** Days before its end at which an authorisation or vision test is flagged. */
export const lapsingDays = 30;

const authorisationState = z.enum(['prepared', 'not-yet-valid', 'valid', 'due-soon', 'expired', 'withdrawn']);

const authorisation = z.object({
  id,
  person,
  method: z.string(),
  technique: z.string().nullable(),
  level,
  products: z.string().nullable(),
  validFrom: day,
  validTo: day,
  state: authorisationState,
  preparedBy: person.nullable(),
  grantedBy: person.nullable(),
  grantedAt: instant.nullable(),
  withdrawnAt: instant.nullable(),
  withdrawnReason: z.string().nullable(),
});
export type Authorisation = z.output<typeof authorisation>;

const byId = z.object({ id });

export const listAuthorisations = operation({
  name: 'list-authorisations',
  method: 'GET',
  path: '/api/authorisations',
  summary: 'Authorisations by person, with what each counts for today.',
  changes: false,
  query: pageQuery.extend({ person: id.optional(), method: method.optional(), state: authorisationState.optional() }),
  response: page(authorisation),
  status: 200,
});

export const prepareAuthorisation = operation({
  name: 'prepare-authorisation',
  method: 'POST',
  path: '/api/authorisations',
  summary: 'Prepares an authorisation; it counts once a level 3 of the method has granted it.',
  changes: true,
  body: z.strictObject({
    person: id,
    method,
    technique: words(40).optional(),
    level,
    products: words(200).optional(),
    validFrom: day,
    validTo: day,
  }),
  response: authorisation,
  status: 201,
});

export const grantAuthorisation = operation({
  name: 'grant-authorisation',
  method: 'POST',
  path: '/api/authorisations/{id}/approval',
  summary:
    'Grants a prepared authorisation, signed by a reviewer who is level 3 in the method; never their own, never one they prepared.',
  changes: true,
  params: byId,
  body: z.strictObject({ password }),
  response: authorisation,
  status: 200,
});

export const withdrawAuthorisation = operation({
  name: 'withdraw-authorisation',
  method: 'POST',
  path: '/api/authorisations/{id}/withdrawal',
  summary: 'Withdraws an authorisation from now on; what was signed under it stays as it was.',
  changes: true,
  params: byId,
  body: z.strictObject({ reason: words(400, 5), password }),
  response: authorisation,
  status: 200,
});

const visionTest = z.object({
  id,
  person,
  test: z.enum(['near-vision', 'colour-perception']),
  result: z.enum(['pass', 'fail']),
  corrected: z.boolean(),
  testedOn: day,
  /** Last day the test counts: near vision 12 months, colour perception 5 years (EN 4179 and NAS 410, from memory). */
  countsTo: day,
  state: z.enum(['valid', 'due-soon', 'expired', 'failed', 'superseded']),
  recordedBy: person.nullable(),
});
export type VisionTest = z.output<typeof visionTest>;

export const listVisionTests = operation({
  name: 'list-vision-tests',
  method: 'GET',
  path: '/api/vision-tests',
  summary: 'Vision tests by person, newest first, with what each counts for today.',
  changes: false,
  query: pageQuery.extend({ person: id.optional(), newest: z.enum(['true', 'false']).optional() }),
  response: page(visionTest),
  status: 200,
});

export const recordVisionTest = operation({
  name: 'record-vision-test',
  method: 'POST',
  path: '/api/vision-tests',
  summary: 'Records a vision test; a record is never changed, a later one stands in its place.',
  changes: true,
  body: z.strictObject({
    person: id,
    test: z.enum(['near-vision', 'colour-perception']),
    result: z.enum(['pass', 'fail']),
    corrected: z.boolean(),
    testedOn: day,
  }),
  response: visionTest,
  status: 201,
});
