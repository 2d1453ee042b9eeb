/** A laboratory of the demo network: every name and place is invented; countries are user-assigned codes of ISO 3166. */
export interface DemoLaboratory {
  code: string;
  name: string;
  kind: 'national institute' | 'calibration laboratory' | 'external institute';
  country: 'XA' | 'XB' | 'XC' | 'XD';
  place: string;
  /** Domain of its e-mails. */
  domain: string;
  /** Holds an accreditation; a works laboratory calibrates for itself only. */
  isAccredited: boolean;
  decisionRule: 'guarded' | 'simple';
}

const HOME = { country: 'XA', kind: 'calibration laboratory', isAccredited: true } as const;
const ABROAD = { kind: 'external institute', isAccredited: false, decisionRule: 'guarded' } as const;
const WORKS = { ...HOME, isAccredited: false } as const;

/** The national institute. */
export const INSTITUTE = 'OI';
/** Calibrated by the institute or abroad; they calibrate for the third level. */
export const SECOND_LEVEL = ['TV', 'PA', 'HM', 'KW', 'UM'] as const;
/** Calibrated by the second level; they calibrate working weights. */
export const THIRD_LEVEL = ['FC', 'QH', 'WF', 'AB', 'DS', 'NC'] as const;
/** Calibrate their own working weights only. */
export const WORKS_LABORATORIES = ['SH', 'OM', 'LM'] as const;

/** Every laboratory, the institute first. */
export const LABORATORIES: readonly DemoLaboratory[] = [
  {
    code: INSTITUTE,
    name: 'Orrin Institute',
    kind: 'national institute',
    country: 'XA',
    place: 'Orrin',
    domain: 'orrin.example',
    isAccredited: false,
    decisionRule: 'guarded',
  },
  {
    ...ABROAD,
    code: 'VI',
    name: 'Vessary Institute of Units',
    country: 'XB',
    place: 'Vessary',
    domain: 'vessary.example',
  },
  {
    ...ABROAD,
    code: 'LH',
    name: 'Lough Harrow Institute',
    country: 'XC',
    place: 'Lough Harrow',
    domain: 'loughharrow.example',
  },
  {
    ...ABROAD,
    code: 'MC',
    name: 'Merrowcape Mass Centre',
    country: 'XD',
    place: 'Merrowcape',
    domain: 'merrowcape.example',
  },
  {
    ...HOME,
    code: 'TV',
    name: 'Tarn Valley Standards',
    place: 'Tarn Valley',
    domain: 'tarnvalley.example',
    decisionRule: 'guarded',
  },
  {
    ...HOME,
    code: 'PA',
    name: 'Port Alder Calibration',
    place: 'Port Alder',
    domain: 'portalder.example',
    decisionRule: 'guarded',
  },
  {
    ...HOME,
    code: 'HM',
    name: 'Hollinmoor Weights',
    place: 'Hollinmoor',
    domain: 'hollinmoor.example',
    decisionRule: 'simple',
  },
  {
    ...HOME,
    code: 'KW',
    name: 'Kessrow Balance House',
    place: 'Kessrow',
    domain: 'kessrow.example',
    decisionRule: 'guarded',
  },
  {
    ...HOME,
    code: 'UM',
    name: 'Undermere Reference Laboratory',
    place: 'Undermere',
    domain: 'undermere.example',
    decisionRule: 'simple',
  },
  {
    ...HOME,
    code: 'FC',
    name: 'Fennick Cross Calibration',
    place: 'Fennick Cross',
    domain: 'fennickcross.example',
    decisionRule: 'guarded',
  },
  {
    ...HOME,
    code: 'QH',
    name: 'Quernhill Weighing',
    place: 'Quernhill',
    domain: 'quernhill.example',
    decisionRule: 'simple',
  },
  {
    ...HOME,
    code: 'WF',
    name: 'Westerfold Scales',
    place: 'Westerfold',
    domain: 'westerfold.example',
    decisionRule: 'guarded',
  },
  {
    ...HOME,
    code: 'AB',
    name: 'Ashlode Bridge Laboratory',
    place: 'Ashlode Bridge',
    domain: 'ashlode.example',
    decisionRule: 'guarded',
  },
  {
    ...HOME,
    code: 'DS',
    name: 'Dunmarrow Standards Room',
    place: 'Dunmarrow',
    domain: 'dunmarrow.example',
    decisionRule: 'simple',
  },
  {
    ...HOME,
    code: 'NC',
    name: 'Narrowcliff Calibration',
    place: 'Narrowcliff',
    domain: 'narrowcliff.example',
    decisionRule: 'guarded',
  },
  {
    ...WORKS,
    code: 'SH',
    name: 'Skerrin Harbour Weighbridge',
    place: 'Skerrin',
    domain: 'skerrin.example',
    decisionRule: 'guarded',
  },
  {
    ...WORKS,
    code: 'OM',
    name: 'Oxlade Market Inspection',
    place: 'Oxlade',
    domain: 'oxlade.example',
    decisionRule: 'guarded',
  },
  {
    ...WORKS,
    code: 'LM',
    name: 'Lowmere Mint',
    place: 'Lowmere',
    domain: 'lowmere.example',
    decisionRule: 'guarded',
  },
];

/** @throws Error for a code that is not there */
export function laboratoryOf(code: string): DemoLaboratory {
  const found = LABORATORIES.find((laboratory) => laboratory.code === code);
  if (!found) throw new Error(`The demo network has no laboratory ${code}`);
  return found;
}
