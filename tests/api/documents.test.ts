import { createHash, randomUUID } from 'node:crypto';
import { readdir, stat, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { readRow } from '#server/db/read.ts';
import { lineOf, makeCalibration, makeStandard } from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();
const home = await makeLaboratory(app);
const other = await makeLaboratory(app);
type Agent = Awaited<ReturnType<typeof app.signIn>>;
const people: Record<string, TestPerson> = {};
const agents: Record<string, Agent> = {};

beforeAll(async () => {
  people.metrologist = await makePerson(app, 'metrologist', home.id);
  people.reader = await makePerson(app, 'reader', home.id);
  people.assessor = await makePerson(app, 'assessor', home.id);
  people.registrar = await makePerson(app, 'registrar');
  people.stranger = await makePerson(app, 'metrologist', other.id);
  for (const [name, person] of Object.entries(people)) agents[name] = await app.signIn(person);
});

/** A document of no other test: the smallest thing that begins and ends as a PDF does. */
const pdf = (text: string = randomUUID()) => Buffer.from(`%PDF-1.7\n% ${text}\n%%EOF\n`);
const send = (
  who: string,
  content: Buffer,
  { laboratory = home.id, name = 'certificate.pdf', type = 'application/pdf' } = {},
) => agents[who]!.post('/api/documents').query({ laboratory, name }).set('Content-Type', type).send(content);
const open = (who: string, id: string) => agents[who]!.get(`/api/documents/${id}`).responseType('blob');

describe('POST /api/documents', () => {
  it('answers 401 without sign-in, before the file is read', async () => {
    const reply = await app.request
      .post('/api/documents')
      .query({ laboratory: home.id, name: 'a.pdf' })
      .set('Content-Type', 'application/pdf')
      .send(pdf());
    expect(reply.status).toBe(401);
  });

  it('answers 400 and names the fields of the address', async () => {
    const reply = await agents
      .metrologist!.post('/api/documents')
      .set('Content-Type', 'application/pdf')
      .send(pdf());
    expect(reply.status).toBe(400);
    expect(Object.keys(reply.body.fields).sort()).toEqual(['laboratory', 'name']);
  });

  it('answers 413 above 20 MB', async () => {
    const reply = await send(
      'metrologist',
      Buffer.concat([pdf(), Buffer.alloc(20 * 1024 * 1024), Buffer.from('%%EOF')]),
    );
    expect(reply.status).toBe(413);
    expect(reply.body.type).toBe('/problems/too-large');
  });

  it.each([
    ['text called PDF', Buffer.from('a letter that says %PDF- and %%EOF somewhere'), 'application/pdf'],
    ['nothing', Buffer.alloc(0), 'application/pdf'],
    ['a picture', Buffer.from('89504e470d0a1a0a0000', 'hex'), 'application/pdf'],
    ['a PDF cut short', pdf().subarray(0, 30), 'application/pdf'],
    ['a PDF followed by something else', Buffer.concat([pdf(), Buffer.alloc(4000, 'x')]), 'application/pdf'],
  ])('refuses %s by its content', async (_what, content, type) => {
    const reply = await send('metrologist', content, { type });
    expect(reply.status).toBe(415);
    expect(reply.body.fields.file).toMatchObject({
      expected: 'a whole PDF document',
      received: expect.any(String),
    });
  });

  it('refuses another media type without reading it', async () => {
    const reply = await send('metrologist', pdf(), { type: 'text/html' });
    expect(reply.status).toBe(415);
  });

  it.each(['reader', 'assessor', 'stranger'])('refuses the %s', async (who) => {
    expect((await send(who, pdf())).status).toBe(403);
  });

  it('answers 404 for an unknown laboratory', async () => {
    expect((await send('registrar', pdf(), { laboratory: randomUUID() })).status).toBe(404);
  });

  it('keeps the file under its hash and answers with its place', async () => {
    const content = pdf();
    const reply = await send('metrologist', content, { name: 'HB 2026-17.pdf' });
    const sha256 = createHash('sha256').update(content).digest('hex');
    expect(reply.status).toBe(201);
    expect(reply.body).toEqual({
      id: expect.any(String),
      name: 'HB 2026-17.pdf',
      size: content.length,
      sha256,
    });
    expect(reply.headers.location).toBe(`/api/documents/${reply.body.id}`);
    const place = path.join(app.dataDir, 'documents', sha256.slice(0, 2));
    expect(await readdir(place)).toEqual([sha256]);
    expect((await stat(path.join(place, sha256))).size).toBe(content.length);
  });

  it('keeps the same content once per laboratory, even when it is sent many times at once', async () => {
    const content = pdf();
    const replies = await Promise.all(Array.from({ length: 6 }, () => send('metrologist', content)));
    expect(replies.map((reply) => reply.status)).toEqual(Array(6).fill(201));
    expect(new Set(replies.map((reply) => reply.body.id)).size).toBe(1);
    const elsewhere = await send('stranger', content, { laboratory: other.id });
    expect(elsewhere.body.id).not.toBe(replies[0]!.body.id);
    const sha256 = elsewhere.body.sha256;
    const kept = await readdir(path.join(app.dataDir, 'documents', sha256.slice(0, 2)));
    expect(kept.filter((name) => name.startsWith(sha256))).toEqual([sha256]);
  });

  it('leaves an act that says who added what', async () => {
    const reply = await send('metrologist', pdf());
    const act = await readRow<{ kind: string; accountId: string; laboratoryId: string; content: string }>(
      app.database,
      `SELECT kind, account_id AS accountId, laboratory_id AS laboratoryId, content FROM act
       WHERE subject_type = 'document' AND subject_id = :id`,
      { id: reply.body.id },
    );
    expect(act).toMatchObject({
      kind: 'document.add',
      accountId: people.metrologist!.accountId,
      laboratoryId: home.id,
    });
    expect(JSON.parse(act!.content).after.sha256).toBe(reply.body.sha256);
  });
});

describe('GET /api/documents/:documentId', () => {
  it('answers 401 without sign-in', async () => {
    expect((await app.request.get(`/api/documents/${randomUUID()}`)).status).toBe(401);
  });

  it.each(['..%2f..%2fetc%2fpasswd', 'nothing', randomUUID()])('answers 404 for %s', async (id) => {
    expect((await agents.registrar!.get(`/api/documents/${id}`)).status).toBe(404);
  });

  it('answers 404 to another laboratory: not even that it exists is told', async () => {
    const { body } = await send('metrologist', pdf());
    const hidden = await agents.stranger!.get(`/api/documents/${body.id}`);
    const absent = await agents.stranger!.get(`/api/documents/${randomUUID()}`);
    expect(hidden.status).toBe(404);
    expect({ ...hidden.body, instance: '' }).toEqual({ ...absent.body, instance: '' });
  });

  it.each(['metrologist', 'reader', 'assessor', 'registrar'])(
    'gives the %s the bytes that were sent',
    async (who) => {
      const content = pdf();
      const { body } = await send('metrologist', content, { name: '../../evil"\r\nX: y ä\u202e.exe' });
      const reply = await open(who, body.id);
      expect(reply.status).toBe(200);
      expect(reply.body).toEqual(content);
      expect(reply.headers['content-type']).toBe('application/pdf');
      expect(reply.headers['x-content-type-options']).toBe('nosniff');
      expect(reply.headers['content-disposition']).toBe(
        `inline; filename="evil X y _ .exe.pdf"; filename*=UTF-8''evil%20X%20y%20%C3%A4%20.exe.pdf`,
      );
    },
  );

  it('gives the certificate that a holder registered to its issuer too, and to nobody else', async () => {
    const [issuer, holder, rival] = [
      await makeLaboratory(app),
      await makeLaboratory(app),
      await makeLaboratory(app),
    ];
    const metrologist = await app.signIn(await makePerson(app, 'metrologist', holder.id));
    const { body } = await metrologist
      .post('/api/documents')
      .query({ laboratory: holder.id, name: 'c.pdf' })
      .set('Content-Type', 'application/pdf')
      .send(pdf());
    const readBy = async (laboratoryId: string) => {
      const agent = await app.signIn(await makePerson(app, 'reader', laboratoryId));
      return (await agent.get(`/api/documents/${body.id}`)).status;
    };
    expect([await readBy(holder.id), await readBy(issuer.id), await readBy(rival.id)]).toEqual([
      200, 404, 404,
    ]);
    const standard = await makeStandard(app, holder.id);
    await makeCalibration(app, holder.id, '2025-03-01', [lineOf(standard.id)], {
      issuerId: issuer.id,
      documentId: body.id,
    });
    expect([await readBy(holder.id), await readBy(issuer.id), await readBy(rival.id)]).toEqual([
      200, 200, 404,
    ]);
  });

  it('does not hand out a file that was changed on disk', async () => {
    const { body } = await send('metrologist', pdf());
    const place = path.join(app.dataDir, 'documents', body.sha256.slice(0, 2), body.sha256);
    await writeFile(place, '%PDF-1.7 something else %%EOF');
    const reply = await open('metrologist', body.id);
    expect(reply.status).toBe(503);
    expect(JSON.parse(String(reply.body)).detail).toMatch(/is not what was kept/);
  });
});
