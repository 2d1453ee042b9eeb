import { expect, it } from 'vitest';
import type { ChainResponse } from '#shared/contracts/chains.ts';
import { fillSentence } from '#shared/rules/sentence.ts';
import { issueCalibration, reviseCalibration } from '#server/modules/calibrations/index.ts';
import { assertAuthorisation } from '#server/modules/network/index.ts';
import { assertFact, assertProperty, createSource } from '#server/modules/standards/index.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { testApp } from '#tests/support/test-app.ts';

/* What the server assembles for the rules, from stored data, and that the chain's memory follows each act. */

const app = await testApp();
const TODAY = app.context().clock.now().toISOString().slice(0, 10);

async function scene() {
  const laboratory = await makeLaboratory(app);
  const person = await makePerson(app, 'signatory', laboratory.id);
  const standard = await makeStandard(app, laboratory.id, { class: 'E2' });
  return { laboratory, person, standard };
}

/** One rule's check of a value, in words. */
async function checkOf(person: TestPerson, uid: string, rule: string) {
  const agent = await app.signIn(person);
  const reply = await agent.get(`/api/chains/${uid}`);
  expect(reply.status, reply.text).toBe(200);
  const { checks, rules } = reply.body as ChainResponse;
  const check = checks.find(
    (one) => one.rule === rule && (one.subject.type !== 'value' || one.subject.uid === uid),
  )!;
  const sentence = rules.find(({ id }) => id === rule)!.sentences[check.sentence!]!;
  return { outcome: check.outcome, severity: check.severity, text: fillSentence(sentence, check.parameters) };
}

it('reads properties, classes and shapes of the weight, and sees the next assertion at once', async () => {
  const { laboratory, person, standard } = await scene();
  const issued = await makeCalibration(app, laboratory.id, '2024-03-01', [lineOf(standard.id)]);
  const uid = issued.valueUids[0]!;
  expect(await checkOf(person, uid, 'B-06')).toMatchObject({ outcome: 'cannot be judged' });
  expect((await checkOf(person, uid, 'B-03')).text).toContain('assumed: 7950 kg/m³, U 140 kg/m³');
  await assertProperty(app.context(), {
    standardId: standard.id,
    kind: 'susceptibility',
    value: '0.5',
    origin: 'measured',
    validFrom: '2023-01-01',
  });
  expect(await checkOf(person, uid, 'B-06')).toMatchObject({ outcome: 'fails', severity: 'major' });
  await assertFact(app.context(), {
    standardId: standard.id,
    kind: 'class',
    value: 'M1',
    validFrom: '2023-01-01',
  });
  expect((await checkOf(person, uid, 'B-06')).text).toContain('class M1');
});

it('reads who signed, and whether they might on the day of issue', async () => {
  const { laboratory, person, standard } = await scene();
  const metrologist = await makePerson(app, 'metrologist', laboratory.id);
  const issue = async (signatoryId: string | null, day = TODAY) => {
    const input = inputOf(laboratory.id, day, [lineOf(standard.id)]);
    return (await issueCalibration(app.context(), input, signatoryId)).valueUids[0]!;
  };
  const [signed, unsigned, wrongly] = [
    await issue(person.accountId),
    await issue(null),
    await issue(metrologist.accountId),
  ];
  expect((await checkOf(person, signed, 'B-38')).outcome).toBe('holds');
  expect((await checkOf(person, unsigned, 'B-38')).outcome).toBe('cannot be judged');
  expect((await checkOf(person, wrongly, 'B-38')).outcome).toBe('fails');
  expect((await checkOf(person, await issue(metrologist.accountId, '2024-03-01'), 'B-38')).text).toContain(
    `was entered on ${TODAY}, by somebody not authorised on the day of issue`,
  );
  await assertAuthorisation(app.context(), {
    accountId: metrologist.accountId,
    laboratoryId: laboratory.id,
    what: 'sign calibrations',
    state: 'granted',
    validFrom: '2020-01-01',
    validTo: null,
  });
  expect((await checkOf(person, wrongly, 'B-38')).outcome).toBe('holds');
});

it('reads the reason of an amendment', async () => {
  const { laboratory, person, standard } = await scene();
  const input = inputOf(laboratory.id, '2024-03-01', [lineOf(standard.id)]);
  const issued = await issueCalibration(app.context(), input);
  const revised = await reviseCalibration(app.context(), {
    ...input,
    calibrationId: issued.calibrationId,
    reason: 'The address was corrected.',
    effectiveOn: '2024-04-01',
    issuedOn: '2024-04-01',
  });
  expect((await checkOf(person, issued.valueUids[0]!, 'B-40')).outcome).toBe('does not apply');
  expect((await checkOf(person, revised.valueUids[0]!, 'B-40')).outcome).toBe('holds');
});

it('reads a drift that was declared for the weight, as soon as it is', async () => {
  const { laboratory, person, standard } = await scene();
  await makeCalibration(app, laboratory.id, '2022-03-01', [lineOf(standard.id)]);
  const moved = lineOf(standard.id, { deviation: '0.0014', reportedDecimals: 2 });
  const issued = await makeCalibration(app, laboratory.id, '2024-03-01', [moved]);
  const uid = issued.valueUids[0]!;
  expect(await checkOf(person, uid, 'B-19')).toMatchObject({ outcome: 'fails' });
  await createSource(app.context(), {
    kind: 'drift',
    name: `Drift of ${standard.registryNo}`,
    u: 0.0003,
    unit: 'g/a',
    standardId: standard.id,
    laboratoryId: laboratory.id,
  });
  const found = await checkOf(person, uid, 'B-19');
  expect(found.outcome).toBe('holds');
  expect(found.text).toContain(
    `with the drift declared for ${standard.registryNo}, 1.2\u2009mg in that time`,
  );
});

it('reads budgets and volumes, and which volume stood', async () => {
  const { laboratory, person, standard } = await scene();
  const reference = await makeStandard(app, laboratory.id, { class: 'E1' });
  const [root] = (await makeCalibration(app, laboratory.id, '2024-01-10', [lineOf(reference.id)])).valueUids;
  const component = (name: string) => ({
    name,
    evaluation: 'B' as const,
    distribution: 'normal' as const,
    standardUncertainty: 1e-4,
    sensitivity: 1,
  });
  const weigh = async (names: string[], sources: { sourceUid: string; sensitivity: number }[] = []) => {
    const line = lineOf(standard.id, {
      references: [useOf(root!, '2024-03-01')],
      components: names.map(component),
      sources,
    });
    return (await makeCalibration(app, laboratory.id, '2024-03-01', [line])).valueUids[0]!;
  };
  const bare = await weigh(['Repeatability', 'Balance']);
  expect((await checkOf(person, bare, 'B-23')).text).toContain(`for what ${reference.registryNo} may have`);
  expect((await checkOf(person, bare, 'B-25')).outcome).toBe('fails');
  const volume = [{ sourceUid: standard.volumeSourceUid!, sensitivity: 0.00003 }];
  const counted = await weigh(['Repeatability', 'Drift of the reference'], volume);
  expect((await checkOf(person, counted, 'B-23')).outcome).toBe('holds');
  expect((await checkOf(person, counted, 'B-25')).text).toContain(`by the volumes of ${standard.registryNo}`);
  expect((await checkOf(person, counted, 'B-52')).text).toContain(`${standard.registryNo}, which stood on`);
});
