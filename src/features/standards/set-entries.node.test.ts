import { describe, expect, it } from 'vitest';
import { RegisterSetBody } from '#shared/contracts/standards.ts';
import { ASSUMED_STEEL, withOrigin } from './density.ts';
import { pastedCells, withPasted } from './paste.ts';
import { SERIES, seriesMembers } from './series.ts';
import { SetEntries, toSetBody, type SetEntriesInput } from './set-entries.ts';

function entries(changes: Partial<SetEntriesInput> = {}): SetEntriesInput {
  const members = seriesMembers(SERIES[0]!, { division: '1-2-2-5', sign: '*', below1g: 'wire' });
  return {
    laboratoryId: '019256f8-d100-768f-b25c-537f2ac54de9',
    registryNo: 'TV 0300',
    name: 'E2 set',
    manufacturer: null,
    inServiceFrom: null,
    intervalMonths: 24,
    class: 'E2',
    material: 'stainless steel',
    density: ASSUMED_STEEL,
    below1g: null,
    members: members.map((member) => ({ ...member, serial: null })),
    ...changes,
  };
}

describe('a set as typed', () => {
  it('becomes the request that registers it', () => {
    const body = toSetBody(SetEntries.parse(entries()));
    expect(RegisterSetBody.safeParse(body).success).toBe(true);
    expect(body.members).toHaveLength(25);
    expect(body.members[0]).toMatchObject({
      nominal: '1000',
      marking: '1 kg',
      class: 'E2',
      material: 'stainless steel',
    });
  });

  it('gives the weights below 1 g their own material where that is said', () => {
    const below1g = { material: 'aluminium', density: null };
    const { members } = toSetBody(SetEntries.parse(entries({ below1g })));
    expect(new Set(members.map((member) => `${Number(member.nominal) < 1} ${member.material}`))).toEqual(
      new Set(['false stainless steel', 'true aluminium']),
    );
  });

  it('names the row that cannot be told apart from another', () => {
    const members = entries().members.map((member) => ({
      ...member,
      marking: member.marking.replace('*', ''),
    }));
    const parsed = SetEntries.safeParse(entries({ members }));
    const issue = parsed.error!.issues[0]!;
    expect(issue.path).toEqual(['members', 3, 'marking']);
    expect(issue.message).toContain('row 3');
  });

  it('asks for at least one weight', () => {
    expect(SetEntries.safeParse(entries({ members: [] })).error!.issues[0]!.path).toEqual(['members']);
  });
});

describe('pasting into the table', () => {
  const rows = entries().members.slice(0, 2);

  it('lays cells over rows to the right and down, and adds rows', () => {
    const cells = pastedCells('2 kg\t2 kg A\t77\n500 mg\t\t\n20 g\n')!;
    const pasted = withPasted(rows, { row: 1, column: 'nominal' }, cells, '.');
    expect(pasted[0]).toEqual(rows[0]);
    expect(pasted[1]).toMatchObject({ nominal: '2000', marking: '2 kg A', serial: '77', shape: 'knob' });
    expect(pasted[2]).toMatchObject({ nominal: '0.5', marking: '500 mg', shape: 'wire', serial: null });
    expect(pasted[3]).toMatchObject({ nominal: '20', marking: '20 g', shape: 'knob' });
  });

  it('keeps what cannot be read, for the form to name', () => {
    const [row] = withPasted(rows, { row: 0, column: 'nominal' }, [['about 1 kg', 'x', '', 'Spoon']], '.');
    expect(row).toMatchObject({ nominal: 'about 1 kg', shape: 'spoon' });
    expect(
      SetEntries.safeParse(entries({ members: [row!] })).error!.issues.map((issue) => issue.path.join('.')),
    ).toEqual(['members.0.nominal', 'members.0.shape']);
  });

  it('leaves a single cell to the browser', () => {
    expect(pastedCells('200 g')).toBeNull();
    expect(pastedCells('200 g\r\n100 g\r\n')).toEqual([['200 g'], ['100 g']]);
  });
});

it('keeps what was typed of a density when its origin changes, and forgets it when it is not known', () => {
  expect(withOrigin({ ...ASSUMED_STEEL, value: '7998' }, 'measured')).toMatchObject({
    value: '7998',
    origin: 'measured',
  });
  expect(withOrigin(null, 'measured')).toEqual({ value: '', expandedU: null, k: '2', origin: 'measured' });
  expect(withOrigin(ASSUMED_STEEL, '')).toBeNull();
});
