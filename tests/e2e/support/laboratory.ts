import { randomUUID } from 'node:crypto';
import { openDatabase } from '#server/db/sequelize.ts';
import { makeContext } from '#server/http/context.ts';
import { assertMembership, createAccount } from '#server/modules/identity/index.ts';
import { assertAuthorisation, assertRecognition, createLaboratory } from '#server/modules/network/index.ts';
import { registerStandard, type StandardRegistration } from '#server/modules/standards/index.ts';
import { PASSWORD } from './people.ts';
import { freeRegistryNo, Register } from './register.ts';

const ALWAYS = { validFrom: '1889-01-01', validTo: null, state: 'granted' } as const;

/** A laboratory of the journey's own, made as the registrar would: nothing of the demo network is touched. */
export class JourneyLaboratory {
  readonly id: string;
  readonly name: string;
  /** Metrologist and signatory at once. */
  readonly email: string;

  private constructor(id: string, name: string, email: string) {
    this.id = id;
    this.name = name;
    this.email = email;
  }

  static async open(): Promise<JourneyLaboratory> {
    const database = openDatabase(databaseUrl(), 2);
    const context = makeContext({ database });
    const { id, name } = await makeLaboratory(context, 'calibration laboratory');
    const email = `journey.${randomUUID().slice(0, 8)}@test.example`;
    const { id: accountId } = await createAccount(context, {
      email,
      name: 'Person of the journey',
      password: PASSWORD,
    });
    for (const role of ['metrologist', 'signatory'] as const) {
      await assertMembership(context, { accountId, laboratoryId: id, role, ...ALWAYS });
    }
    await assertAuthorisation(context, { accountId, laboratoryId: id, what: 'sign calibrations', ...ALWAYS });
    await database.close();
    return new JourneyLaboratory(id, name, email);
  }

  /** A standard of this laboratory. @returns its id and registry number */
  async register(
    changes: Pick<StandardRegistration, 'marking'> & Partial<StandardRegistration>,
  ): Promise<{ id: string; registryNo: string }> {
    const register = new Register();
    const registryNo = await freeRegistryNo(register, 'JRN');
    await register.close();
    const database = openDatabase(databaseUrl(), 2);
    const standard = await registerStandard(makeContext({ database }), {
      laboratoryId: this.id,
      registryNo,
      nominal: '1000',
      serial: null,
      manufacturer: null,
      shape: 'cylinder',
      material: 'stainless steel',
      class: null,
      density: null,
      inServiceFrom: null,
      intervalMonths: null,
      ...changes,
    });
    await database.close();
    return standard;
  }
}

/** A recognized institute abroad, recognized for as long as certificates of it may be old. */
export async function recognizedInstitute(): Promise<{ name: string }> {
  const database = openDatabase(databaseUrl(), 2);
  const context = makeContext({ database });
  const { name } = await makeLaboratory(context, 'external institute');
  await database.close();
  return { name };
}

async function makeLaboratory(
  context: ReturnType<typeof makeContext>,
  kind: 'calibration laboratory' | 'external institute',
): Promise<{ id: string; name: string }> {
  const code = `J${randomUUID().replaceAll('-', '').slice(0, 9).toUpperCase()}`;
  const name = `${kind === 'external institute' ? 'Institute' : 'Laboratory'} ${code}`;
  const { id } = await createLaboratory(context, { code, name, kind, country: 'XX', place: 'Testing' });
  await assertRecognition(context, {
    laboratoryId: id,
    kind: kind === 'external institute' ? 'institute arrangement' : 'accreditation',
    body: 'Board of the journeys',
    number: code,
    arrangement: 'Arrangement of the journeys',
    ...ALWAYS,
  });
  return { id, name };
}

function databaseUrl(): string {
  const url = process.env.DATABASE_URL;
  if (!url) throw new Error('DATABASE_URL is not set: run "npm test -- journeys".');
  return url;
}
