import type { DownstreamBy, DownstreamRow, WhatIfRow } from '#shared/contracts/downstream.ts';
import { paths } from '#src/app/paths.ts';
import { Cell, RowLink } from '#src/components/ui/table.tsx';
import { NominalText } from './group-rows.tsx';

interface WeightCellsProps {
  row: DownstreamRow | WhatIfRow;
  /** Grouped by anything else, a row names its laboratory itself. */
  by: DownstreamBy;
}

/** Weight and nominal: all that is told of the weights of others. One's own open their chain; a weight may stand with its mass beside its conventional mass. */
export function WeightCells({ row, by }: WeightCellsProps) {
  const laboratory = row.view === 'full' ? row.holder : row.laboratory;
  return (
    <>
      <Cell className="pl-4">
        <span className="font-mono text-sm whitespace-nowrap">
          {row.view === 'full' ? (
            <RowLink to={paths.chain.href(row.uid)}>{row.registryNo}</RowLink>
          ) : (
            row.registryNo
          )}
        </span>
        {by !== 'laboratory' && <span className="block text-sm text-ink-2">{laboratory.name}</span>}
      </Cell>
      <Cell>
        <NominalText row={row} />
        {row.view === 'full' && row.quantity === 'mass' && <span className="text-ink-2">, mass</span>}
      </Cell>
    </>
  );
}
