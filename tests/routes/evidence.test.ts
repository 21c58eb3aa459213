import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import sharp from 'sharp';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { GET as original } from '@/app/api/evidence/[id]/route';
import { GET as facts } from '@/app/api/evidence/[id]/facts/route';
import { GET as pixels } from '@/app/api/evidence/[id]/pixels/route';
import { GET as preview } from '@/app/api/evidence/[id]/preview/route';
import { POST as admit } from '@/app/api/evidence/route';
import { DELETE as unlink, PUT as link } from '@/app/api/inspections/[id]/evidence/[evidenceId]/route';
import { POST as open } from '@/app/api/inspections/route';
import { unpackPixels } from '@/components/viewer/packed-pixels';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, select, sqlTimeOf } from '@/db/work';
import { evidenceFile, type EvidenceFile } from '@/services/contracts/evidence';
import { inspection, linkEvidence } from '@/services/contracts/inspections';
import { call, partOf, person, setting, type Answer, type Person, type Setting } from './inspection-setting';

let inspector: Person;
let auditor: Person;
let plan: Setting;

beforeAll(async () => {
  inspector = await person('inspector');
  auditor = await person('auditor');
  plan = await setting(inspector);
});
afterAll(closeDatabase);

/** A 16-bit grey PNG nobody has sent before. */
async function radiograph(): Promise<Uint8Array<ArrayBuffer>> {
  const [width, height] = [64, 48];
  const values = new Uint16Array(width * height).map((_, place) => (place * 257) % 65536);
  values.set(new TextEncoder().encode(newId()));
  return new Uint8Array(
    await sharp(values, { raw: { width, height, channels: 1 } })
      .toColourspace('grey16')
      .png()
      .toBuffer(),
  );
}

function sending(
  bytes: Uint8Array | ReadableStream,
  more: { as?: Person | null; name?: string; kind?: string; headers?: Record<string, string> } = {},
): Promise<Answer> {
  const as = more.as === undefined ? inspector : more.as;
  const query = `?kind=${more.kind ?? 'radiograph'}&name=${encodeURIComponent(more.name ?? 'blade 7.png')}`;
  return call(admit, { method: 'POST', query, body: bytes, headers: more.headers ?? {}, ...(as ? { as } : {}) });
}

async function rowsOf(bytes: Uint8Array): Promise<number> {
  const digest = createHash('sha256').update(bytes).digest('hex');
  return (await select(reading(), 'SELECT id FROM evidence WHERE sha256 = ?', [digest])).length;
}

describe('admitting a file', () => {
  test('201 with digest and facts, then the same id for the same bytes; two at once make one row', async () => {
    const bytes = await radiograph();
    const both = await Promise.all([sending(bytes), sending(bytes, { name: 'copy.png' })]);
    expect(both.map(({ status }) => status).sort()).toEqual([200, 201]);
    const [one, two] = both.map(({ json }) => evidenceFile.parse(json));
    expect(one?.id).toBe(two?.id);
    expect(one).toMatchObject({
      sha256: createHash('sha256').update(bytes).digest('hex'),
      bytes: bytes.byteLength,
      mediaType: 'image/png',
      width: 64,
      height: 48,
      bits: 16,
    });
    expect(await rowsOf(bytes)).toBe(1);
    expect((await sending(bytes)).status).toBe(200);
  });

  test('a DICOM file written by somebody else, with its pitch (dcmdump: 128 x 128, PixelSpacing 0.661468)', async () => {
    const bytes = new Uint8Array(await readFile('/usr/lib/python3/dist-packages/pydicom/data/test_files/CT_small.dcm'));
    // Its preamble, which DICOM leaves free (PS3.10 7.1), holds a TIFF head; here it is blank.
    bytes.fill(0, 0, 128);
    const file = evidenceFile.parse((await sending(bytes, { name: 'CT_small.dcm' })).json);
    expect(file).toMatchObject({
      mediaType: 'application/dicom',
      width: 128,
      height: 128,
      pixelPitchUm: '661.468',
      hasPixels: true,
      hasPreview: true,
    });
    const misnamed = await sending(bytes.slice(0, 5000), { name: 'blade.png' });
    expect([misnamed.status, misnamed.problem]).toEqual([415, 'wrong-file-kind']);
  });

  test('415 for bytes that are not what they say, 422 for a torn picture', async () => {
    const script = await sending(new TextEncoder().encode('<svg xmlns="http://www.w3.org/2000/svg"><script>1</script></svg>'));
    expect([script.status, script.problem]).toEqual([415, 'wrong-file-kind']);
    const whole = await radiograph();
    const torn = whole.slice(0, Math.floor(whole.byteLength / 2));
    const answer = await sending(torn);
    expect([answer.status, answer.problem]).toEqual([422, 'unreadable-file']);
    expect(await rowsOf(torn)).toBe(0);
  });

  test('a body shorter than its Content-Length is not admitted', async () => {
    const bytes = await radiograph();
    const answer = await sending(bytes, { headers: { 'content-length': String(bytes.byteLength + 1000) } });
    expect(answer.status).toBe(422);
    expect(await rowsOf(bytes)).toBe(0);
  });

  test('an upload that breaks off is not admitted', async () => {
    const bytes = await radiograph();
    let sent = 0;
    const breaking = new ReadableStream<Uint8Array>({
      pull(controller) {
        sent += 1;
        if (sent === 1) controller.enqueue(bytes.slice(0, 200));
        else controller.error(new Error('connection lost'));
      },
    });
    const answer = await sending(breaking);
    expect(answer.status).toBe(422);
    expect(await rowsOf(bytes.slice(0, 200))).toBe(0);
  });

  test('413 for 300 MB, declared or not', async () => {
    const declared = await sending(new Uint8Array(10), { headers: { 'content-length': String(300 * 1024 * 1024) } });
    expect([declared.status, declared.problem]).toEqual([413, 'too-large']);
    const head = await radiograph();
    let sent = 0;
    const endless = new ReadableStream<Uint8Array>({
      pull(controller) {
        if (sent === 0) controller.enqueue(head);
        else controller.enqueue(new Uint8Array(1024 * 1024));
        sent += 1;
        if (sent > 300) controller.close();
      },
    });
    const answer = await sending(endless);
    expect([answer.status, answer.problem]).toEqual([413, 'too-large']);
    expect(sent).toBeLessThan(300);
  }, 120_000);

  test('names with slashes or hidden characters are refused', async () => {
    const bytes = await radiograph();
    for (const name of ['../../etc/passwd', 'a\u202egnp.exe', 'a\r\nSet-Cookie: x'])
      expect((await sending(bytes, { name })).status).toBe(422);
  });

  test('no session 401, auditor and customer 403', async () => {
    const bytes = await radiograph();
    expect((await sending(bytes, { as: null })).status).toBe(401);
    expect((await sending(bytes, { as: auditor })).status).toBe(403);
    expect((await sending(bytes, { as: await person('customer-quality', plan.customerId) })).status).toBe(403);
    expect(await rowsOf(bytes)).toBe(0);
  });
});

describe('reading a file', () => {
  test('the stored bytes with ETag, digest and a cage; 304 when they are there', async () => {
    const bytes = await radiograph();
    const { id, sha256 } = evidenceFile.parse((await sending(bytes, { name: 'Schaufel “7”.png' })).json);
    const response = await original(new Request('http://127.0.0.1:3200/api/evidence', { headers: { cookie: auditor.cookie } }), {
      params: Promise.resolve({ id }),
    });
    expect(new Uint8Array(await response.arrayBuffer())).toEqual(bytes);
    expect(response.headers.get('etag')).toBe(`"${sha256}"`);
    expect(response.headers.get('repr-digest')).toBe(`sha-256=:${createHash('sha256').update(bytes).digest('base64')}:`);
    expect(response.headers.get('x-content-type-options')).toBe('nosniff');
    expect(response.headers.get('content-security-policy')).toContain('sandbox');
    expect(response.headers.get('content-disposition')).toMatch(
      /^attachment; filename="Schaufel _7_\.png"; filename\*=UTF-8''Schaufel%20/,
    );
    expect((await call(original, { as: auditor, params: { id }, headers: { 'if-none-match': `"${sha256}"` } })).status).toBe(304);
  });

  test('a preview, and packed pixels that unpack to the stored 16-bit values', async () => {
    const bytes = await radiograph();
    const { id } = evidenceFile.parse((await sending(bytes)).json);
    const asked = () => new Request('http://127.0.0.1:3200/x', { headers: { cookie: inspector.cookie } });
    const picture = Buffer.from(await (await preview(asked(), { params: Promise.resolve({ id }) })).arrayBuffer());
    // RIFF container, lossy bitstream: 14 bits of width at byte 26 (RFC 9649, RFC 6386 9.1).
    expect([picture.toString('latin1', 0, 4), picture.toString('latin1', 8, 15), picture.readUInt16LE(26) & 0x3fff]).toEqual([
      'RIFF',
      'WEBPVP8',
      64,
    ]);
    const packed = await pixels(asked(), { params: Promise.resolve({ id }) });
    expect(packed.headers.get('content-type')).toBe('application/octet-stream');
    const grey = await unpackPixels(await packed.arrayBuffer());
    const raw = await sharp(bytes).toColourspace('grey16').raw({ depth: 'ushort' }).toBuffer();
    expect(Buffer.from(grey.pixels.buffer).equals(raw)).toBe(true);
  });
});

async function released(evidenceId: string, partId: string, images: boolean): Promise<void> {
  await inTransaction(null, async (work) => {
    const at = sqlTimeOf(work.now);
    const [order, line, shipment, release, inspectionId] = [newId(), newId(), newId(), newId(), newId()];
    const tag = order.slice(-10);
    await execute(work, 'INSERT INTO orders (id, number, customer_id, purchase_order, created_at) VALUES (?, ?, ?, ?, ?)', [
      order,
      `O-${tag}`,
      plan.customerId,
      `PO-${tag}`,
      at,
    ]);
    await execute(
      work,
      'INSERT INTO order_lines (id, order_id, line, drawing_revision_id, quantity, clauses) SELECT ?, ?, 1, drawing_revision_id, 5, ? FROM plan_issues WHERE id = ?',
      [line, order, JSON.stringify({ images }), plan.planId],
    );
    await execute(work, 'INSERT INTO shipments (id, number, order_line_id, created_by, created_at) VALUES (?, ?, ?, ?, ?)', [
      shipment,
      `S-${tag}`,
      line,
      inspector.id,
      at,
    ]);
    await execute(
      work,
      `INSERT INTO releases (id, shipment_id, customer_id, record, record_digest, sentence, signed_by, signed_at) VALUES (?, ?, ?, '{}', ?, 'I release', ?, ?)`,
      [release, shipment, plan.customerId, 'a'.repeat(64), inspector.id, at],
    );
    await execute(work, 'INSERT INTO release_parts (release_id, part_id, release_cycle) VALUES (?, ?, 0)', [release, partId]);
    await execute(
      work,
      `INSERT INTO inspections (id, number, part_id, requirement_id, cycle, plan_issue_id, method, verdict, reading_count, indication_count, engine, criteria_digest, input_digest, record, record_digest, sentence, signed_by, acted_at, entered_at, signed_at)
       VALUES (?, ?, ?, ?, 1, ?, 'penetrant', 'accept', 0, 0, '1', ?, ?, '{}', ?, 's', ?, ?, ?, ?)`,
      [
        inspectionId,
        `I-${tag}`,
        partId,
        plan.penetrant,
        plan.planId,
        'a'.repeat(71),
        'a'.repeat(71),
        'a'.repeat(64),
        inspector.id,
        at,
        at,
        at,
      ],
    );
    await execute(
      work,
      `INSERT INTO inspection_evidence (inspection_id, evidence_id, role, linked_by, linked_at) VALUES (?, ?, 'radiograph', ?, ?)`,
      [inspectionId, evidenceId, inspector.id, at],
    );
  });
}

describe('a customer', () => {
  test('sees files of their own released parts where the order shows images; nobody else’s', async () => {
    const own = await person('customer-quality', plan.customerId);
    const other = await person('customer-quality', (await setting(inspector)).customerId);
    const file: EvidenceFile = evidenceFile.parse((await sending(await radiograph())).json);
    const hidden: EvidenceFile = evidenceFile.parse((await sending(await radiograph())).json);
    const seen = async (who: Person, id: string) =>
      Promise.all(
        [original, facts, preview, pixels].map(async (handler) => (await call(handler, { as: who, params: { id } })).status),
      );
    expect(await seen(own, file.id)).toEqual([404, 404, 404, 404]);
    await released(file.id, await partOf(plan, inspector, 'released'), true);
    await released(hidden.id, await partOf(plan, inspector, 'released'), false);
    expect(await seen(own, file.id)).toEqual([200, 200, 200, 200]);
    expect(await seen(other, file.id)).toEqual([404, 404, 404, 404]);
    expect(await seen(own, hidden.id)).toEqual([404, 404, 404, 404]);
    expect(await seen(own, newId())).toEqual([404, 404, 404, 404]);
  });

  test('no session: 401 on every call', async () => {
    const { id } = evidenceFile.parse((await sending(await radiograph())).json);
    for (const handler of [original, facts, preview, pixels]) expect((await call(handler, { params: { id } })).status).toBe(401);
  });
});

describe('attaching to a draft', () => {
  test('with role, view and registration; detached again; the file stays', async () => {
    const draft = inspection.parse(
      (
        await call(open, {
          method: 'POST',
          as: inspector,
          body: { subject: { part: await partOf(plan, inspector) }, requirement: 'fpi' },
        })
      ).json,
    );
    const { id } = evidenceFile.parse((await sending(await radiograph())).json);
    const params = { id: draft.id, evidenceId: id };
    const body = { role: 'photograph', view: 'concave', registration: { umPerPixel: '48.2' } };
    const linked = await call(link, { method: 'PUT', as: inspector, params, body });
    expect(
      linkEvidence.response.parse(linked.json).evidence.map((one) => [one.id, one.role, one.view, one.registration]),
    ).toEqual([[id, 'photograph', 'concave', { umPerPixel: '48.2' }]]);
    const again = await call(link, { method: 'PUT', as: inspector, params, body: { role: 'radiograph' } });
    expect(linkEvidence.response.parse(again.json).evidence.map(({ role, view }) => [role, view])).toEqual([
      ['radiograph', null],
    ]);
    for (const [as, status] of [
      [undefined, 401],
      [auditor, 403],
    ] as const) {
      expect((await call(link, { method: 'PUT', params, body, ...(as ? { as } : {}) })).status).toBe(status);
      expect((await call(unlink, { method: 'DELETE', params, ...(as ? { as } : {}) })).status).toBe(status);
    }
    expect((await call(link, { method: 'PUT', as: inspector, params: { ...params, evidenceId: newId() }, body })).status).toBe(
      404,
    );
    expect((await call(unlink, { method: 'DELETE', as: inspector, params })).status).toBe(204);
    expect((await call(unlink, { method: 'DELETE', as: inspector, params })).status).toBe(404);
    expect((await call(facts, { as: inspector, params: { id } })).status).toBe(200);
  });
});
