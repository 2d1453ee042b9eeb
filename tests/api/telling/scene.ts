import type { Role } from '#shared/contracts/identity.ts';
import { openEpoch } from '#server/modules/standards/index.ts';
import {
  inputOf,
  lineOf,
  makeCalibration,
  makeStandard,
  useOf,
} from '#tests/support/calibration-factories.ts';
import { makeLaboratory, makePerson, type TestPerson } from '#tests/support/factories.ts';
import { makeNotice, makeScale, termOf } from '#tests/support/notice-scene.ts';
import type { TestApp } from '#tests/support/test-app.ts';

type Laboratory = Awaited<ReturnType<typeof makeLaboratory>>;

const LABORATORIES = ['institute', 'home', 'customer', 'second', 'another', 'beyond', 'nowhere'] as const;
export type LaboratoryName = (typeof LABORATORIES)[number];

/** A value with everything of it that could be told, each text found nowhere else in the register. */
export interface Planted {
  uid: string;
  revisionId: string;
  standardId: string;
  certificateNo: string;
  registryNo: string;
  marking: string;
  /** Digits of the deviation and of U, after the zeros. */
  digits: string;
  uDigits: string;
  /** A day on which nothing else was determined. */
  day: string;
  holder: LaboratoryName;
  issuer: LaboratoryName;
}

export type ValueName =
  | 'root'
  | 'working'
  | 'homes'
  | 'others'
  | 'customers'
  | 'seconds'
  | 'again'
  | 'below'
  | 'beyonds'
  | 'unseen';

export type Teller = keyof typeof PEOPLE;

/** Every kind of person, in every relation to home's customer. */
const PEOPLE = {
  registrar: ['registrar', null],
  'administrator of the holder': ['laboratory administrator', 'customer'],
  'metrologist of the holder': ['metrologist', 'customer'],
  'signatory of the holder': ['signatory', 'customer'],
  'reader of the holder': ['reader', 'customer'],
  'administrator of the issuer': ['laboratory administrator', 'home'],
  'metrologist of the issuer': ['metrologist', 'home'],
  'signatory of the issuer': ['signatory', 'home'],
  'reader of the issuer': ['reader', 'home'],
  'metrologist of the other issuer': ['metrologist', 'another'],
  'metrologist of the institute': ['metrologist', 'institute'],
  'signatory of the institute': ['signatory', 'institute'],
  'metrologist of the second customer': ['metrologist', 'second'],
  'metrologist beyond': ['metrologist', 'beyond'],
  'metrologist of nowhere': ['metrologist', 'nowhere'],
  'assessor of the issuer': ['assessor', 'home'],
  'assessor of nowhere': ['assessor', 'nowhere'],
  'comparison pilot': ['comparison pilot', null],
} as const satisfies Record<string, readonly [Role, LaboratoryName | null]>;

export const TELLERS = Object.keys(PEOPLE) as Teller[];

/** The laboratory of a person; null for who has none. */
export const laboratoryOf = (teller: Teller): LaboratoryName | null => PEOPLE[teller][1];

export interface TellingScene {
  app: TestApp;
  laboratories: Record<LaboratoryName, Laboratory>;
  values: Record<ValueName, Planted>;
  people: Record<Teller, TestPerson>;
  noticeId: string;
  /** What the customer wrote when it opened a new epoch of its weight. */
  epochNote: string;
}

/**
 * Root - working standard - references of home and of another laboratory. Home calibrates a weight of its customer and
 * one of a second customer; the customer calibrates a weight of its own from it, and has its weight
 * calibrated again by the other laboratory, which also works for a laboratory beyond. `unseen` is nowhere in that tree.
 */
export async function makeTellingScene(app: TestApp): Promise<TellingScene> {
  const laboratories = {} as TellingScene['laboratories'];
  for (const name of LABORATORIES) {
    laboratories[name] = await makeLaboratory(app, name === 'institute' ? 'national institute' : undefined);
  }
  const one = planter(app, laboratories);
  const root = await one('institute', '2024-01-11', null, { holder: 'institute' });
  const working = await one('institute', '2024-02-12', root, { holder: 'institute' });
  const homes = await one('institute', '2024-03-13', working, { holder: 'home' });
  const others = await one('institute', '2024-03-14', working, { holder: 'another' });
  const customers = await one('home', '2024-04-15', homes, { holder: 'customer' });
  const seconds = await one('home', '2024-04-16', homes, { holder: 'second' });
  const below = await one('customer', '2024-05-16', customers, { holder: 'customer' });
  const again = await one('another', '2024-09-17', others, { holder: 'customer', of: customers });
  const beyonds = await one('another', '2024-10-18', others, { holder: 'beyond' });
  const unseen = await one('nowhere', '2024-11-19', null, { holder: 'nowhere' });
  const epochNote = `note ${customers.marking}`;
  await openEpoch(app.context(), customers.standardId, {
    reason: 'damaged',
    beginsOn: '2024-12-20',
    lastGoodOn: '2024-12-01',
    note: epochNote,
  });
  const people = {} as TellingScene['people'];
  for (const teller of TELLERS) {
    const [role, laboratory] = PEOPLE[teller];
    people[teller] = await makePerson(app, role, laboratory && laboratories[laboratory].id);
  }
  const scale = await makeScale(app);
  const notice = await makeNotice(app, laboratories.institute.id, scale.id, { terms: [termOf('-0.00002')] });
  return {
    ...{ app, laboratories, people, epochNote },
    values: {
      ...{ root, working, homes, others, customers, seconds, again, below, beyonds, unseen },
    },
    noticeId: notice.id,
  };
}

/** Issues values whose numbers are their own. */
function planter(app: TestApp, laboratories: TellingScene['laboratories']) {
  let planted = 0;
  return async (
    issuer: LaboratoryName,
    day: string,
    above: Planted | null,
    { holder, of }: { holder: LaboratoryName; of?: Planted },
  ): Promise<Planted> => {
    planted += 1;
    const { id: holderId, code } = laboratories[holder];
    const marking = of?.marking ?? `mark ${code}${planted}`;
    const standard = of
      ? { id: of.standardId, registryNo: of.registryNo }
      : await makeStandard(app, holderId, { marking });
    // No sum, difference or half of two of these is a third.
    const digits = String(200_003 + ((planted * planted * 7_919 + 31 * planted) % 90_001));
    const uDigits = String(410_009 + ((planted ** 3 * 1_301 + 97 * planted) % 180_007));
    const line = lineOf(standard.id, {
      deviation: `0.000${digits}`,
      reportedDecimals: 6,
      expandedU: `0.000${uDigits}`,
      reportedUDecimals: 6,
      class: 'E2',
      ...(above && { references: [useOf(above.uid, day)] }),
    });
    const changes = { registeredById: holderId };
    const { certificateNo } = inputOf(holderId, day, [line]);
    const issued = await makeCalibration(app, laboratories[issuer].id, day, [line], {
      ...changes,
      certificateNo,
    });
    return {
      ...{ uid: issued.valueUids[0]!, revisionId: issued.revisionId, certificateNo },
      ...{
        standardId: standard.id,
        registryNo: standard.registryNo,
        marking,
        digits,
        uDigits,
        day,
        holder,
        issuer,
      },
    };
  };
}
