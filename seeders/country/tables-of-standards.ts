import type { Country } from './country.ts';
import { actOf, dayText, instantText } from './days.ts';
import { GRADES, type Grade } from './grades.ts';
import { identifier, type IdentifierKind } from './identifiers.ts';
import { PIECES, type Piece } from './pieces.ts';
import { line, NULL, type CountryTable } from './table.ts';
import { columns, laboratoryId } from './tables-of-network.ts';
import { REGISTERED_BEFORE, type WeightSet } from './weight-sets.ts';

/** kg/m3 */
export const DENSITY = 8000;

/** Standard uncertainty of a piece's volume, cm3: its nominal volume times the relative u of its density. */
export function volumeU({ nominal }: Piece, { densityU }: Grade): number {
  return ((Number(nominal) / DENSITY) * 1000 * densityU) / 2 / DENSITY;
}

/** Identifier of something that a standard or its set has once. */
export function standardRowId(country: Country, kind: IdentifierKind, set: WeightSet, index: number): string {
  return identifier(country.seed, kind, index, registeredOn(set));
}

function registeredOn(set: WeightSet): number {
  return set.startDay - REGISTERED_BEFORE;
}

interface One {
  set: WeightSet;
  piece: Piece;
  grade: Grade;
  index: number;
  /** 1 for the first of its set. */
  position: number;
  id: string;
  holder: string;
  since: string;
  /** Instant and act of its registration. */
  recorded: [string, number];
}

/** Rows of a table that has `rowsOf` each standard. */
function ofEachStandard(
  table: string,
  columnText: string,
  rowsOf: (one: One, country: Country) => string,
): CountryTable {
  return {
    table,
    columns: columns(columnText),
    *rows(country) {
      for (const set of country.sets) {
        const day = registeredOn(set);
        const recorded: [string, number] = [instantText(day), actOf(day)];
        for (let at = 0; at < set.count; at += 1) {
          const index = set.firstStandard + at;
          yield rowsOf(
            {
              set,
              piece: PIECES[set.from + at]!,
              grade: GRADES[set.level]!,
              index,
              position: at + 1,
              id: standardRowId(country, 'standard', set, index),
              holder: laboratoryId(country, set.holder),
              since: dayText(day),
              recorded,
            },
            country,
          );
        }
      }
    },
  };
}

const isSet = (set: WeightSet) => set.count > 1;
const numberOf = (country: Country, set: WeightSet) =>
  `${country.laboratories[set.holder]!.code} ${String(set.index).padStart(5, '0')}`;

/** Tables of weights and what is asserted of them. */
export const STANDARD_TABLES: readonly CountryTable[] = [
  ofEachStandard(
    'standard',
    'id registry_no kind nominal marking serial manufacturer shape material in_service_from laboratory_id recorded_at act_seq',
    ({ set, piece, position, id, holder, since, recorded }, country) => {
      const kind = set.level === 0 ? 'realization' : set.level === 1 ? 'prototype' : 'weight';
      const registryNo = `${numberOf(country, set)}-${String(position).padStart(2, '0')}`;
      const shape = Number(piece.nominal) < 1 ? 'wire' : 'knob';
      return line(
        id,
        registryNo,
        kind,
        piece.column,
        piece.marking,
        NULL,
        NULL,
        shape,
        'stainless steel',
        since,
        holder,
        ...recorded,
      );
    },
  ),
  ofEachStandard(
    'epoch',
    'id standard_id n reason begins_on last_good_on note recorded_at act_seq',
    ({ set, index, id, since, recorded }, country) =>
      line(standardRowId(country, 'epoch', set, index), id, 1, 'new', since, NULL, NULL, ...recorded),
  ),
  ofEachStandard(
    'standard_fact',
    'id standard_id kind laboratory_id value valid_from valid_to recorded_at act_seq',
    ({ set, grade, index, id, holder, since, recorded }, country) => {
      const fact = (n: number, kind: string, laboratory: string, value: string) =>
        line(
          standardRowId(country, 'fact', set, index * 4 + n),
          id,
          kind,
          laboratory,
          value,
          since,
          NULL,
          ...recorded,
        );
      return (
        fact(0, 'owner', holder, NULL) +
        fact(1, 'custodian', holder, NULL) +
        fact(2, 'state', NULL, 'in service') +
        (grade.class === null ? '' : fact(3, 'class', NULL, grade.class))
      );
    },
  ),
  ofEachStandard(
    'programme',
    'id standard_id laboratory_id interval_months method justification valid_from valid_to recorded_at act_seq',
    ({ set, index, id, holder, since, recorded }, country) =>
      line(
        ...[
          standardRowId(country, 'programme', set, index),
          id,
          holder,
          set.intervalMonths,
          'fixed interval',
        ],
        ...['Stated by the holder at registration.', since, NULL, ...recorded],
      ),
  ),
  ofEachStandard(
    'source',
    'id uid kind name u unit degrees_of_freedom estimate standard_id laboratory_id determined_on recorded_at act_seq',
    ({ set, piece, grade, position, index, id, holder, recorded }, country) =>
      line(
        ...[index + 1, standardRowId(country, 'source', set, index), 'volume'],
        ...[
          `Volume of ${numberOf(country, set)}-${String(position).padStart(2, '0')}`,
          volumeU(piece, grade),
          'cm3',
        ],
        ...[NULL, NULL, id, holder, NULL, ...recorded],
      ),
  ),
  ofEachStandard(
    'property',
    'id standard_id kind value expanded_u k origin note source_id valid_from valid_to recorded_at act_seq',
    ({ set, grade, index, id, since, recorded }, country) =>
      line(
        ...[standardRowId(country, 'property', set, index), id, 'density', DENSITY, grade.densityU, 2],
        ...[grade.densityU < 50 ? 'measured' : 'manufacturer', NULL, index + 1, since, NULL, ...recorded],
      ),
  ),
  {
    table: 'weight_set',
    columns: columns('id registry_no name laboratory_id recorded_at act_seq'),
    *rows(country) {
      for (const set of country.sets.filter(isSet)) {
        const day = registeredOn(set);
        const id = standardRowId(country, 'set', set, set.index);
        const holder = laboratoryId(country, set.holder);
        yield line(id, numberOf(country, set), `Set of ${set.count}`, holder, instantText(day), actOf(day));
      }
    },
  },
  ofEachStandard(
    'set_member',
    'set_id standard_id position valid_from valid_to recorded_at act_seq',
    ({ set, position, id, since, recorded }, country) =>
      isSet(set)
        ? line(standardRowId(country, 'set', set, set.index), id, position, since, NULL, ...recorded)
        : '',
  ),
];
