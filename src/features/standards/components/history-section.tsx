import type { ReactNode } from 'react';
import type { QuantityKind } from '#shared/contracts/common.ts';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { Section } from '#src/components/layout/page.tsx';
import { EmptyState } from '#src/components/ui/empty-state.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { plotGeometry } from '../history/plot-geometry.ts';
import { historyLegend, historySummary } from '../history/history-words.ts';
import { HistoryPlot } from './history-plot.tsx';
import { HistoryTable } from './history-table.tsx';
import { useWidth } from './use-width.ts';

interface HistorySectionProps {
  sheet: StandardResponse;
  /** Which of the two quantities is shown. */
  quantity: QuantityKind;
  onQuantity: (quantity: QuantityKind) => void;
  /** The first step where there is no value yet. */
  firstStep: ReactNode;
}

/** Every value the standard ever had, drawn and in a table of the same facts. */
export function HistorySection({ sheet, quantity, onQuantity, firstStep }: HistorySectionProps) {
  const kinds = new Set(sheet.history.map((value) => value.quantity));
  const values = sheet.history.filter((value) => value.quantity === quantity);
  const [ref, width] = useWidth<HTMLDivElement>(720);
  const height = width < 480 ? 260 : 310;
  const geometry = plotGeometry({
    values,
    epochs: sheet.epochs,
    errorLimit: quantity === 'conventional mass' ? sheet.maximumPermissibleError : null,
    weightClass: sheet.standard.class,
    dueOn: sheet.programme?.dueOn ?? null,
    width,
    height,
  });
  return (
    <Section
      title="History"
      note={kinds.size === 1 ? quantity : undefined}
      actions={
        kinds.size > 1 && (
          <Switch
            label="Quantity"
            isLabelHidden
            value={quantity}
            onChange={onQuantity}
            choices={[
              { value: 'conventional mass', label: 'Conventional mass' },
              { value: 'mass', label: 'Mass' },
            ]}
          />
        )
      }
    >
      {geometry ? (
        <>
          <div ref={ref} className="min-w-0 overflow-hidden">
            <HistoryPlot
              geometry={geometry}
              width={width}
              height={height}
              summary={historySummary({ ...sheet, history: values }, quantity)}
            />
          </div>
          <p className="pb-2 text-sm text-ink-3">{historyLegend(geometry.points)}</p>
          <div className="overflow-x-auto">
            <HistoryTable sheet={{ ...sheet, history: values }} />
          </div>
        </>
      ) : (
        <EmptyState action={firstStep}>
          Values stand here once a calibration of this standard is issued: each with its U, the change since
          the one before, and whether it is in force.
        </EmptyState>
      )}
    </Section>
  );
}
