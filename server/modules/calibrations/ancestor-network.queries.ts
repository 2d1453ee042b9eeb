import type { Sequelize } from 'sequelize';
import type { Network } from '#shared/engine/network/network.ts';
import { readRows } from '#server/db/read.ts';

/** Ids by which values and sources go into the engine. */
export const valueNode = (id: number): string => `v${id}`;
export const sourceNode = (id: number): string => `s${id}`;

/** UNION, never UNION ALL: shared references would be walked once per path. The anchor is cast, or its type is the literal's. */
const ANCESTOR_IDS = `
  WITH RECURSIVE above (id) AS (
    SELECT CAST(v.id AS UNSIGNED) FROM assigned_value v WHERE v.id IN (:ids)
    UNION
    SELECT l.parent_id FROM above a JOIN value_link l ON l.child_id = a.id AND l.role = 'reference')
  SELECT v.id, v.local_u AS localU, v.local_degrees_of_freedom AS degreesOfFreedom, v.local_origin AS localOrigin,
    v.local_estimate AS estimate, c.id AS calibrationId, c.certificate_no AS certificateNo,
    s.registry_no AS registryNo
  FROM above a JOIN assigned_value v ON v.id = a.id JOIN revision r ON r.id = v.revision_id
  JOIN calibration c ON c.id = r.calibration_id JOIN standard s ON s.id = v.standard_id`;

const LINKS = `
  SELECT l.child_id AS childId, l.parent_id AS parentId, l.sensitivity, l.used_as AS usedAs,
    l.used_expanded_u AS usedExpandedU, l.used_k AS usedK
  FROM value_link l WHERE l.child_id IN (:ids) AND l.role = 'reference'`;

const SOURCE_LINKS = `
  SELECT l.child_id AS childId, l.source_id AS sourceId, l.sensitivity
  FROM source_link l WHERE l.child_id IN (:ids)`;

const SOURCES = `
  SELECT id, u, degrees_of_freedom AS degreesOfFreedom, estimate FROM source WHERE id IN (:ids)`;

const COVARIANCES = `
  SELECT k.group_id AS groupId, k.row_id AS rowId, k.column_id AS columnId, k.covariance
  FROM group_covariance k WHERE k.row_id IN (:ids) AND k.column_id IN (:ids) ORDER BY k.group_id`;

/** An ancestor as the rules name it. */
export interface Ancestor {
  id: number;
  calibrationId: string;
  certificateNo: string;
  registryNo: string;
}

/** Everything above some values: the engine's network, in grams, and the ancestors by name. */
export interface AncestorNetwork {
  network: Network;
  ancestors: Ancestor[];
}

interface AncestorRow extends Ancestor {
  localU: number | null;
  localOrigin: string;
  degreesOfFreedom: number | null;
  estimate: string | null;
}

interface LinkRow {
  childId: number;
  parentId: number;
  sensitivity: number;
  usedAs: string;
  usedExpandedU: string | null;
  usedK: string | null;
}

interface CovarianceRow {
  groupId: number;
  rowId: number;
  columnId: number;
  covariance: number;
}

/**
 * Loads the values and all they lean on, local parts as frozen. `sourceIds` are nodes even where no ancestor
 * leans on them, so that their covariance with the values can be asked for.
 */
export async function ancestorNetwork(
  database: Sequelize,
  valueIds: readonly number[],
  sourceIds: readonly number[],
): Promise<AncestorNetwork> {
  const rows = valueIds.length
    ? await readRows<AncestorRow>(database, ANCESTOR_IDS, { ids: [...valueIds] })
    : [];
  const ids = rows.map((row) => row.id);
  const links = ids.length ? await readRows<LinkRow>(database, LINKS, { ids }) : [];
  const sourceLinks = ids.length
    ? await readRows<{ childId: number; sourceId: number; sensitivity: number }>(database, SOURCE_LINKS, {
        ids,
      })
    : [];
  const grouped = rows.some((row) => row.localOrigin === 'group');
  const covariances = grouped ? await readRows<CovarianceRow>(database, COVARIANCES, { ids }) : [];
  const allSources = [...new Set([...sourceIds, ...sourceLinks.map((link) => link.sourceId)])];
  const sources = allSources.length
    ? await readRows<{ id: number; u: number }>(database, SOURCES, { ids: allSources })
    : [];
  return {
    ancestors: rows,
    network: {
      values: rows.map(({ id, localU }) => ({ id: valueNode(id), local: localU })),
      sources: sources.map(({ id, u }) => ({ id: sourceNode(id), standardUncertainty: u })),
      groups: groupsOf(covariances),
      links: [
        ...links.map(networkLink),
        ...sourceLinks.map((link) => ({
          child: valueNode(link.childId),
          parent: sourceNode(link.sourceId),
          sensitivity: link.sensitivity,
        })),
      ],
    },
  };
}

function networkLink(link: LinkRow): Network['links'][number] {
  const plain = {
    child: valueNode(link.childId),
    parent: valueNode(link.parentId),
    sensitivity: link.sensitivity,
  };
  if (link.usedAs !== 'class limit') return plain;
  const standardUncertainty = Number(link.usedExpandedU ?? 0) / Number(link.usedK ?? Math.sqrt(3));
  return { ...plain, classLimit: { standardUncertainty } };
}

function groupsOf(rows: readonly CovarianceRow[]): NonNullable<Network['groups']> {
  const byGroup = new Map<number, CovarianceRow[]>();
  for (const row of rows) {
    const known = byGroup.get(row.groupId);
    if (known) known.push(row);
    else byGroup.set(row.groupId, [row]);
  }
  return [...byGroup.values()].map((cells) => {
    const members = [...new Set(cells.map((cell) => cell.rowId))];
    const at = new Map(members.map((id, place) => [id, place]));
    const covariance = members.map(() => members.map(() => 0));
    for (const cell of cells) {
      const row = at.get(cell.rowId);
      const column = at.get(cell.columnId);
      if (row === undefined || column === undefined) continue;
      covariance[row]![column] = cell.covariance;
      covariance[column]![row] = cell.covariance;
    }
    return { members: members.map(valueNode), covariance };
  });
}
