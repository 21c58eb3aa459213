import { newId } from '@/db/identity';
import { insert, insertAll } from '@/db/models/table';
import { accounts } from '@/db/repositories/accounts';
import { partRequirements, parts } from '@/db/repositories/parts';
import { planIssues, requirements } from '@/db/repositories/plans';
import { lots } from '@/db/repositories/lots';
import { execute, inTransaction, sqlTimeOf, type Work } from '@/db/work';
import { hashPassword } from '@/services/accounts/passwords';
import { openSession } from '@/services/accounts/sessions';
import type { Role } from '@/services/contracts/common';
import { planContent } from '@/services/contracts/plan-content';
import '../support/stack';

export const signingPassword = 'bench-password-7';

export interface Person {
  readonly id: string;
  readonly name: string;
  readonly cookie: string;
}

/** A signed-in account of a role; one argon2 hash serves all. */
const oneHash = hashPassword(signingPassword);

export async function person(role: Role, customerId: string | null = null): Promise<Person> {
  const id = newId();
  const name = `Robin ${id.slice(-6)}`;
  const passwordHash = await oneHash;
  return inTransaction(null, async (work) => {
    await insert(work, accounts, {
      id,
      email: `${id}@aldermoor.example`,
      name,
      role,
      releaseAuthority: false,
      customerId,
      accessUntil: null,
      passwordHash,
      pinHash: passwordHash,
      pinFailures: 0,
      locale: 'en',
      disabledAt: null,
      version: 0,
      createdAt: work.now,
    });
    return { id, name };
  }).then(async (account) => {
    const now = await inTransaction(null, (work) => Promise.resolve(work.now));
    return { ...account, cookie: (await openSession(id, now, 'test', 'test')).split(';')[0] ?? '' };
  });
}

/** Authorises a person for a method, level 2, with both vision tests, as of today. */
export async function qualify(who: Person, method: string, level = '2', nearVisionDaysAgo = 30): Promise<void> {
  await inTransaction(null, async (work) => {
    await execute(
      work,
      `INSERT INTO authorisations (id, account_id, method, technique, level, valid_from, valid_to, granted_by, granted_at, created_at)
       VALUES (?, ?, ?, NULL, ?, DATE(?) - INTERVAL 100 DAY, DATE(?) + INTERVAL 100 DAY, ?, ?, ?)`,
      [
        newId(),
        who.id,
        method,
        level,
        sqlTimeOf(work.now),
        sqlTimeOf(work.now),
        who.id,
        sqlTimeOf(work.now),
        sqlTimeOf(work.now),
      ],
    );
    for (const [test, daysAgo] of [
      ['near-vision', nearVisionDaysAgo],
      ['colour-perception', 400],
    ] as const) {
      await execute(
        work,
        `INSERT INTO vision_tests (id, account_id, test, result, corrected, tested_on, created_at) VALUES (?, ?, ?, 'pass', 0, DATE(?) - INTERVAL ? DAY, ?)`,
        [newId(), who.id, test, sqlTimeOf(work.now), daysAgo, sqlTimeOf(work.now)],
      );
    }
  });
}

/** A gauge of a kind; calibrated 30 days ago and due in `dueInDays`. */
export async function gauge(method: string, kind: string, dueInDays = 100): Promise<string> {
  const id = newId();
  await inTransaction(null, async (work) => {
    await execute(work, 'INSERT INTO equipment (id, number, title, kind, method, created_at) VALUES (?, ?, ?, ?, ?, ?)', [
      id,
      `G-${id.slice(-8)}`,
      'Gauge',
      kind,
      method,
      sqlTimeOf(work.now),
    ]);
    await execute(
      work,
      `INSERT INTO calibrations (id, equipment_id, \`function\`, as_found, as_left, calibrated_on, due_on, recorded_by, created_at)
       VALUES (?, ?, 'all', 'good', 'good', DATE(?) - INTERVAL 30 DAY, DATE(?) + INTERVAL ? DAY, ?, ?)`,
      [newId(), id, sqlTimeOf(work.now), sqlTimeOf(work.now), dueInDays, newId(), sqlTimeOf(work.now)],
    );
  });
  return id;
}

const criteria = {
  lengthUnit: 'mm',
  linear: { ratio: '3', at: 'above' },
  characteristics: [
    {
      number: '12',
      title: 'Wall, station 1',
      unit: 'mm',
      lower: '0.05',
      upper: '1.05',
      decision: { rule: 'guarded', form: 'non-binary', g: '1' },
    },
    {
      number: '13',
      title: 'Wall, station 2',
      unit: 'mm',
      lower: '0.75',
      upper: '1.05',
      decision: { rule: 'guarded', form: 'non-binary', g: '1' },
    },
  ],
  attributes: [{ number: '40', title: 'No residual core' }],
  process: [{ number: 'P3', title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '60' }],
  zones: [
    {
      id: 'B',
      view: 'concave',
      polygon: [
        [0, 0],
        [40000, 0],
        [40000, 25000],
        [0, 25000],
      ],
    },
  ],
  indicationRules: [
    {
      id: 'N7b',
      clause: 'Note 7b',
      zones: ['B'],
      methods: ['penetrant'],
      types: ['*'],
      rules: [{ kind: 'max-size', class: 'rounded', limit: '0.75' }],
    },
  ],
};

export interface Setting {
  readonly customerId: string;
  readonly planId: string;
  readonly drawingId: string;
  readonly wall: string;
  readonly penetrant: string;
  readonly technique: string;
  /** Scope of the process check the penetrant operation leans on; good when the setting is made. */
  readonly line: string;
}

async function drawingOf(work: Work, tag: string): Promise<{ customerId: string; drawingId: string; revisionId: string }> {
  const [customerId, drawingId, revisionId] = [newId(), newId(), newId()];
  const at = sqlTimeOf(work.now);
  await execute(
    work,
    `INSERT INTO customers (id, code, name, address, quality_email, created_at) VALUES (?, ?, 'Kestrel Turbines', 'Somewhere', 'q@kestrel.example', ?)`,
    [customerId, `K${tag}`, at],
  );
  await execute(work, `INSERT INTO drawings (id, number, title, customer_id, created_at) VALUES (?, ?, 'HPT blade', ?, ?)`, [
    drawingId,
    `DWG-${tag}`,
    customerId,
    at,
  ]);
  await execute(work, `INSERT INTO drawing_revisions (id, drawing_id, revision, created_at) VALUES (?, ?, 'C', ?)`, [
    revisionId,
    drawingId,
    at,
  ]);
  return { customerId, drawingId, revisionId };
}

/** A process check of a scope, valid for eight hours. */
export async function recordCheck(work: Work, scope: string, result: 'good' | 'failed'): Promise<void> {
  const at = sqlTimeOf(work.now);
  await execute(
    work,
    `INSERT INTO process_checks (id, scope, method, title, kind, result, at, valid_until, done_by, created_at) VALUES (?, ?, 'penetrant', 'Known-defect panel', 'opening', ?, ?, ? + INTERVAL 8 HOUR, ?, ?)`,
    [newId(), scope, result, at, at, newId(), at],
  );
}

/** An approved plan with a wall-thickness and a penetrant operation, its technique and its uncertainties. */
export async function setting(by: Person): Promise<Setting> {
  const tag = newId().slice(-10);
  const technique = `UT-${tag}`;
  const content = planContent.parse({
    views: [{ name: 'concave', title: 'Concave', widthUm: 60000, heightUm: 40000 }],
    criteria,
    route: [
      {
        key: 'wall',
        operation: '40',
        title: 'Wall thickness',
        method: 'ultrasonic-thickness',
        technique,
        characteristics: ['12', '13'],
        blockCheck: { unit: 'mm', steps: [{ nominal: '1.00', tolerance: '0.02' }] },
      },
      {
        key: 'fpi',
        operation: '50',
        title: 'Fluorescent penetrant',
        method: 'penetrant',
        views: ['concave'],
        attributes: ['40'],
        process: ['P3'],
        indicationRules: ['N7b'],
        evidence: [{ role: 'photograph', minimum: 1 }],
        checks: [`line ${tag}`],
      },
    ],
  });
  return inTransaction(null, async (work) => {
    const at = sqlTimeOf(work.now);
    const { customerId, drawingId, revisionId } = await drawingOf(work, tag);
    const planId = newId();
    await insert(work, planIssues, {
      id: planId,
      drawingRevisionId: revisionId,
      issue: 1,
      state: 'approved',
      content,
      contentDigest: '0'.repeat(64),
      preparedBy: by.id,
      preparedAt: work.now,
      approvedBy: by.id,
      approvedAt: work.now,
      version: 1,
    });
    const rows = content.route.map((row, position) => ({
      id: newId(),
      planIssueId: planId,
      position,
      key: row.key ?? '',
      operation: row.operation,
      title: row.title,
      method: row.method,
      technique: row.technique ?? null,
      content: row,
    }));
    await insertAll(work, requirements, rows);
    await execute(
      work,
      `INSERT INTO technique_issues (id, number, issue, method, title, standard, state, content, author, created_at) VALUES (?, ?, 1, 'ultrasonic-thickness', 'Contact, delay line', 'ASTM E797', 'approved', '{}', ?, ?)`,
      [newId(), technique, by.id, at],
    );
    for (const characteristic of ['12', '13']) {
      await execute(
        work,
        `INSERT INTO measurement_processes (id, technique, characteristic, gauge_kind, expanded, k, unit, basis, valid_from, created_at) VALUES (?, ?, ?, 'ut-gauge', '0.020', '2', 'mm', 'GUM budget', DATE(?) - INTERVAL 9 DAY, ?)`,
        [newId(), technique, characteristic, at, at],
      );
    }
    await recordCheck(work, `line ${tag}`, 'good');
    return {
      line: `line ${tag}`,
      customerId,
      planId,
      drawingId,
      technique,
      wall: rows[0]?.id ?? '',
      penetrant: rows[1]?.id ?? '',
    };
  });
}

/** One serialised part of the plan. */
export async function partOf(
  plan: Setting,
  by: Person,
  state: 'serialised' | 'scrapped' | 'released' = 'serialised',
  held = false,
): Promise<string> {
  const [partId, clusterId] = [newId(), newId()];
  await inTransaction(null, async (work) => {
    await insert(work, lots, {
      id: clusterId,
      kind: 'cluster',
      number: `C-${clusterId.slice(-10)}`,
      quantity: 1,
      attributes: {},
      version: 0,
      createdBy: by.id,
      createdAt: work.now,
    });
    await insert(work, parts, {
      id: partId,
      drawingId: plan.drawingId,
      serial: `S-${partId.slice(-10)}`,
      planIssueId: plan.planId,
      customerId: plan.customerId,
      clusterId,
      position: '1',
      state,
      held,
      metCount: 0,
      requirementCount: 2,
      nextRequirement: 'Wall thickness',
      openFindings: 0,
      releaseCycle: 0,
      version: 0,
      createdAt: work.now,
    });
    await insertAll(
      work,
      partRequirements,
      [plan.wall, plan.penetrant].map((requirementId, position) => ({
        partId,
        requirementId,
        position,
        state: 'open' as const,
        inspectionId: null,
        cycle: 1,
        reason: null,
      })),
    );
  });
  return partId;
}

type Handler = (
  request: Request,
  context: { params: Promise<Record<string, string | string[] | undefined>> },
) => Promise<Response>;

export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  /** Parsed by the contract of the call in each test. */
  readonly json: unknown;
  /** Of a problem: its code, and the fields or reasons it names. */
  readonly problem: string | null;
  readonly detail: string;
  readonly errors: readonly { readonly path: string; readonly message: string }[];
}

interface Call {
  readonly method?: string;
  readonly as?: Person;
  readonly params?: Record<string, string>;
  readonly query?: string;
  readonly body?: unknown;
  readonly headers?: Record<string, string>;
}

/** Calls a handler as the router would. */
export async function call(
  handler: Handler,
  { method = 'GET', as, params = {}, query = '', body, headers = {} }: Call,
): Promise<Answer> {
  const raw = body instanceof Uint8Array || body instanceof ReadableStream || typeof body === 'string';
  const request = new Request(`http://127.0.0.1:3200/api/test${query}`, {
    method,
    headers: {
      ...(as ? { cookie: as.cookie } : {}),
      ...(raw || body === undefined ? {} : { 'content-type': 'application/json' }),
      ...headers,
    },
    ...(body === undefined ? {} : { body: raw ? (body as BodyInit) : JSON.stringify(body) }),
    ...(body instanceof ReadableStream ? { duplex: 'half' } : {}),
  } as RequestInit);
  const response = await handler(request, { params: Promise.resolve(params) });
  const text = response.headers.get('content-type')?.includes('json') ? await response.clone().text() : '';
  const json = JSON.parse(text === '' ? '{}' : text) as { type?: string; detail?: string; errors?: Answer['errors'] };
  const problem = json.type?.startsWith('/problems/') ? json.type.slice('/problems/'.length) : null;
  return {
    status: response.status,
    headers: response.headers,
    json,
    problem,
    detail: json.detail ?? '',
    errors: json.errors ?? [],
  };
}
