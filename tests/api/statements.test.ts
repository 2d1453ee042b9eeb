import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { StatementResponse } from '#shared/contracts/statements.ts';
import { lineOf, makeCalibration, makeStandard, useOf } from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { pdfFonts, pdfPages } from '#tests/support/pdf-text.ts';
import { testApp } from '#tests/support/test-app.ts';

const app = await testApp();

const FILES = [
  'drawing.svg',
  'drawing.pdf',
  'chain.json',
  'take-along.html',
  'strip.pdf',
  'statement.json',
  'statement.pdf',
] as const;
type File = (typeof FILES)[number];

/**
 * The institute's weight gives its value to one that a second laboratory holds, and that one to a third's: the third
 * may know what the certificates above state, and not who holds the weights.
 */
async function threeLaboratories() {
  const institute = await makeLaboratory(app, 'national institute');
  const middle = await makeLaboratory(app);
  const low = await makeLaboratory(app);
  const [top, between, own] = [
    await makeStandard(app, institute.id),
    await makeStandard(app, middle.id),
    await makeStandard(app, low.id),
  ];
  const root = await makeCalibration(app, institute.id, '2024-01-10', [lineOf(top.id)]);
  const second = await makeCalibration(
    app,
    institute.id,
    '2024-03-10',
    [lineOf(between.id, { references: [useOf(root.valueUids[0]!, '2024-03-10')], expandedU: '0.0007' })],
    { registeredById: middle.id },
  );
  const third = await makeCalibration(app, low.id, '2024-06-10', [
    lineOf(own.id, { references: [useOf(second.valueUids[0]!, '2024-06-10')], expandedU: '0.0009' }),
  ]);
  return {
    institute,
    middle,
    low,
    own,
    between,
    top,
    uid: third.valueUids[0]!,
    secondUid: second.valueUids[0]!,
  };
}

const scene = await threeLaboratories();
const reader = await makePerson(app, 'reader', scene.low.id);
const registrar = await makePerson(app, 'registrar');
const stranger = await makePerson(app, 'metrologist', (await makeLaboratory(app)).id);

async function take(
  person: TestPerson,
  file: File,
  query = 'day=2025-01-01&known=2026-01-01',
  uid = scene.uid,
) {
  const agent = await app.signIn(person);
  return agent
    .get(`/api/chains/${uid}/${file}?${query}`)
    .buffer(true)
    .parse((response, done) => {
      const chunks: Buffer[] = [];
      response.on('data', (chunk: Buffer) => chunks.push(chunk));
      response.on('end', () => done(null, Buffer.concat(chunks)));
    });
}

const sha256 = (content: Buffer | string) => createHash('sha256').update(content).digest('hex');

/** Everything a document says that can be read: its text, whatever its kind. */
function wordsOf(file: File, body: Buffer): string {
  return file.endsWith('.pdf') ? pdfPages(body).join('\n') : body.toString('utf8');
}

describe('documents of a chain', () => {
  it.each(FILES)('%s is saved under a clear name, shown by nothing and kept by nothing', async (file) => {
    const reply = await take(reader, file);
    expect(reply.status).toBe(200);
    const extension = file.split('.')[1];
    expect(reply.headers['content-disposition']).toMatch(
      new RegExp(
        `^attachment; filename="${scene.own.registryNo} \\w+ 2025-01-01( [0-9a-f]{16})?\\.${extension}"`,
      ),
    );
    expect(reply.headers['x-content-type-options']).toBe('nosniff');
    expect(reply.headers['cache-control']).toBe('no-store');
    expect(reply.body.length).toBeGreaterThan(500);
  });

  it.each(FILES)('%s: the same question gives the same bytes', async (file) => {
    const [one, two] = [await take(reader, file), await take(reader, file)];
    expect(sha256(one.body)).toBe(sha256(two.body));
    const other = await take(reader, file, 'day=2025-01-02&known=2026-01-01');
    expect(sha256(other.body)).not.toBe(sha256(one.body));
  });

  it.each(FILES)('%s tells a reader below nothing of who holds a weight above', async (file) => {
    // What the reader's own chain does not hold, no document made of it holds.
    const { text } = await (await app.signIn(reader)).get(`/api/chains/${scene.uid}`);
    const chain = JSON.parse(text) as ChainResponse;
    const above = chain.nodes.find((node) => node.uid === scene.secondUid)!;
    expect(above).toMatchObject({ view: 'statement', holder: null });
    const full = wordsOf('statement.json', (await take(registrar, 'statement.json')).body);
    expect(JSON.parse(full).steps[1].holder).toBe(scene.middle.name);
    const words = wordsOf(file, (await take(reader, file)).body);
    if (file === 'statement.json') expect(JSON.parse(words).steps[1].holder).toBeNull();
    expect(words).not.toContain(scene.middle.name);
    expect(words).not.toContain(scene.middle.code);
    expect(words).not.toContain('"localOrigin"');
  });

  it.each(FILES)('%s is not for those who may not read the chain', async (file) => {
    expect((await take(stranger, file)).status).toBe(404);
    expect((await app.request.get(`/api/chains/${scene.uid}/${file}`)).status).toBe(401);
  });

  it.each([
    ['day=2025-02-30', 'day'],
    ['known=yesterday', 'known'],
    ['verdict=good', 'verdict'],
    ['draw=3d', 'draw'],
    ['as=wished', 'as'],
    ['fold=shape', 'fold'],
  ])('refuses %s and names the field', async (query, field) => {
    const reply = await take(reader, 'statement.pdf', query);
    expect(reply.status).toBe(400);
    expect(reply.headers['content-type']).toContain('application/problem+json');
    expect(Object.keys(JSON.parse(reply.body.toString('utf8')).fields)).toEqual([field]);
  });

  it('draws a second chain beside the first, where its reader may see that one too', async () => {
    const drawing = (await take(reader, 'drawing.svg', `with=${scene.secondUid}`)).body.toString('utf8');
    expect(drawing).toContain(`data-plate="${scene.secondUid}"`);
    expect(drawing).toContain('Beside it');
    const foreign = await makeCalibration(app, scene.middle.id, '2024-07-10', [
      lineOf((await makeStandard(app, scene.middle.id)).id),
    ]);
    expect((await take(reader, 'drawing.svg', `with=${foreign.valueUids[0]}`)).status).toBe(404);
  });

  it('refuses a ground that there is none of', async () => {
    expect((await take(reader, 'drawing.svg', 'theme=pink')).status).toBe(400);
  });
});

describe('chain.json', () => {
  it('is the chain’s own reply in one spelling', async () => {
    const query = 'day=2025-01-01&known=2026-01-01';
    const reply = await (await app.signIn(reader)).get(`/api/chains/${scene.uid}?${query}`);
    const text = (await take(reader, 'chain.json', query)).body.toString('utf8');
    expect(JSON.parse(text)).toEqual(reply.body);
    expect(text).not.toMatch(/<|\n/);
  });
});

describe('statement of traceability', () => {
  it('fits its contract, and its PDF prints the hash of exactly these bytes', async () => {
    const json = (await take(reader, 'statement.json')).body as Buffer;
    const statement = StatementResponse.parse(JSON.parse(json.toString('utf8')));
    const chain = (await take(reader, 'chain.json')).body as Buffer;
    expect(statement.chainSha256).toBe(sha256(chain));
    const pages = pdfPages((await take(reader, 'statement.pdf')).body);
    const text = pages.join('');
    expect(text).toContain(sha256(json));
    expect(text).toContain(sha256(chain));
    expect(text).toContain(`page ${pages.length} of ${pages.length}`);
  });

  it('tells each step, the checks under both verdicts, and what it does not say', async () => {
    const statement = JSON.parse(
      (await take(reader, 'statement.json')).body.toString('utf8'),
    ) as StatementResponse;
    expect(statement.steps.map(({ registryNo }) => registryNo)).toEqual([
      scene.own.registryNo,
      scene.between.registryNo,
      scene.top.registryNo,
    ]);
    expect(statement.steps[0]!.words).toContain('conventional mass, deviation from nominal +120 ± 900');
    expect(new Set(statement.checks.map(({ verdict }) => verdict))).toEqual(new Set(['conduct', 'today']));
    const said = statement.notSaid.join(' ');
    for (const words of [
      'no judgement of fitness',
      'law',
      'accreditation',
      'as known on 2026-01-01',
      'rule set',
    ])
      expect(said).toContain(words);
    expect(JSON.stringify(statement)).not.toMatch(/compliant/i);
  });

  it('sets shipped fonts only', async () => {
    for (const file of ['statement.pdf', 'strip.pdf', 'drawing.pdf'] as const)
      for (const font of pdfFonts((await take(reader, file)).body))
        expect(font).toMatch(/^(InstrumentSans|Newsreader|SourceSerif|CommitMono)/);
  });

  it('keeps the shares of its steps conserved: what enters a step and what it adds is what passes through', async () => {
    const chain = JSON.parse((await take(registrar, 'chain.json')).body.toString('utf8')) as ChainResponse;
    for (const node of chain.nodes) {
      if (node.type !== 'value' || node.share === null || node.localShare === null || node.rootKind) continue;
      const entering = chain.links
        .filter(({ childUid }) => childUid === node.uid)
        .reduce((sum, { flow }) => sum + (flow ?? 0), 0);
      expect(entering + node.localShare).toBeCloseTo(node.share, 9);
    }
  });
});

describe('strip', () => {
  it('goes from the weight to the root, one step a row, with its question at the foot', async () => {
    const text = pdfPages((await take(reader, 'strip.pdf')).body).join('');
    const at = [scene.own, scene.between, scene.top].map(({ registryNo }) => text.indexOf(registryNo, 60));
    expect(at.every((place) => place >= 0)).toBe(true);
    expect(text).toContain('In force on 2025-01-01, as known on 2026-01-01');
    expect(text).toContain('page 1 of 1');
  });
});

describe('page to take along', () => {
  it('carries the chain under its own hash, and may ask nothing of anybody', async () => {
    const reply = await take(reader, 'take-along.html');
    const html = reply.body.toString('utf8');
    const carried = /<script type="application\/json" id="chain">(.*)<\/script>/.exec(html)![1]!;
    const chain = (await take(reader, 'chain.json')).body as Buffer;
    expect(carried).toBe(chain.toString('utf8'));
    expect(html).toContain(`data-content="${sha256(chain)}"`);
    expect(reply.headers['content-disposition']).toContain(sha256(chain).slice(0, 16));
    const policy = /http-equiv="Content-Security-Policy" content="([^"]*)"/.exec(html)![1]!;
    expect(policy).toContain("default-src 'none'");
    expect(policy).not.toContain('unsafe');
    const script = /<script>([\s\S]*?)<\/script>/.exec(html)![1]!;
    const style = /<style>([\s\S]*?)<\/style>/.exec(html)![1]!;
    for (const [directive, text] of [
      ['script-src', script],
      ['style-src', style],
    ] as const)
      expect(policy).toContain(`${directive} 'sha256-${createHash('sha256').update(text).digest('base64')}'`);
    expect(html).not.toMatch(/\s(src|href|style|on\w+)="/);
  });
});
