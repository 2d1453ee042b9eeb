import type { Role } from '#shared/contracts/identity.ts';
import { LABORATORIES } from './laboratories.ts';

/** The password of every account of the demo network. */
export const DEMO_PASSWORD = 'exagium demo';

/** A person with an account and the roles they hold. */
export interface DemoPerson {
  email: string;
  name: string;
  roles: { role: Role; laboratory: string | null; from: string; to: string | null }[];
}

const SINCE = '2016-06-01';
const NAMES =
  'Ilse Marrin,Tobin Ashgrove,Mara Quill,Edric Lowfell,Sanna Brook,Piers Halden,Nerys Vane,Olin Thrush,Wanda Keel,Corin Stead,Lena Farrow,Hugo Penrith,Asta Moor,Bram Tilling,Freya Combe,Jory Wick,Dilys Hern,Anton Reed,Greta Sorrel,Milo Hatch,Rhona Pike,Stellan Firth,Vera Lund,Osric Dale,Tilda Crane,Ewan Sallow,Petra Holm,Ludo Marsh,Ines Calder,Rolf Wynd,Sorcha Bell,Torin Beck'.split(
    ',',
  );

/** A name for the n-th person. */
function nameOf(n: number): string {
  return NAMES[n % NAMES.length]!;
}

/** A metrologist and a signatory in each laboratory of the country, and the people of the demo accounts. */
export function demoPeople(): DemoPerson[] {
  const staff = LABORATORIES.filter((laboratory) => laboratory.kind !== 'external institute').flatMap(
    ({ code, domain }, at) =>
      (['metrologist', 'signatory'] as const).map((role, which): DemoPerson => ({
        email: `${role}@${domain}`,
        name: nameOf(2 * at + which),
        roles: [{ role, laboratory: code, from: SINCE, to: null }],
      })),
  );
  const account = (
    email: string,
    name: string,
    role: Role,
    laboratory: string | null,
    days = { from: SINCE, to: null as string | null },
  ): DemoPerson => ({ email, name, roles: [{ role, laboratory, ...days }] });
  return [
    account('registrar@network.example', 'Maud Serle', 'registrar', null),
    account('pilot@network.example', 'Caspar Iden', 'comparison pilot', null),
    account('administrator@portalder.example', 'Una Thorpe', 'laboratory administrator', 'PA'),
    account('reader@portalder.example', 'Felix Orme', 'reader', 'PA'),
    account('assessor@network.example', 'Hester Vale', 'assessor', 'PA', {
      from: '2026-11-01',
      to: '2027-03-31',
    }),
    ...staff,
  ];
}
