/** A row's own rows, as MariaDB aggregates them: the connector reads JSON where the column says that it is some. */
export type JsonList<Row> = readonly Row[] | string | null;

/**
 * The rows of a list that was aggregated to JSON, so that one query brings a thing with all that belongs to it: a
 * query for each table would take longer to be sent and answered than to be worked out. Decimals have to be cast to text.
 */
export function rowsOf<Row>(list: JsonList<Row>): Row[] {
  if (list === null) return [];
  return typeof list === 'string' ? (JSON.parse(list) as Row[]) : [...list];
}
