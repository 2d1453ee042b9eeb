import type { StandardResponse } from '#shared/contracts/standards.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { dateAsKnown } from '../history/days.ts';
import { monthsText } from '../words.ts';
import { DueMark } from './due-mark.tsx';
import { PropertyValue } from './property-value.tsx';

/** What one wants to know of a standard without leaving the list. */
export function ShortFacts({ sheet }: { sheet: StandardResponse }) {
  const { standard, programme, leansOnThis } = sheet;
  const { value } = standard;
  const density = sheet.properties.find((property) => property.kind === 'density');
  return (
    <Facts
      facts={[
        ['Marking', standard.serial ? `${standard.marking}, serial ${standard.serial}` : standard.marking],
        ['Holder', standard.holder.name],
        ['State', standard.state],
        [
          'Deviation',
          value ? (
            <>
              <Quantity
                value={value.deviation}
                expandedUncertainty={value.expandedU}
                coverageFactor={value.k}
                kind="deviation"
                shownIn="auto"
              />
              {value.expandedU === null ? ', U not stated' : value.k !== null && ` (k = ${value.k})`},{' '}
              {value.quantity}
            </>
          ) : (
            'no value in force'
          ),
        ],
        ['Calibrated', value && dateAsKnown(value)],
        ['Certificate', value && <span className="font-mono text-sm">{value.certificateNo}</span>],
        ['Density', density && <PropertyValue property={density} />],
        ['Interval', programme && monthsText(programme.intervalMonths)],
        ['Next due', programme?.dueOn && <DueMark dueOn={programme.dueOn} />],
        ['In service', standard.inServiceFrom && <DateText value={standard.inServiceFrom} />],
        ['Leans on this', weightsText(leansOnThis.weights)],
      ]}
    />
  );
}

function weightsText(count: number): string {
  if (count === 0) return 'nothing yet';
  return count === 1 ? '1 weight' : `${formatDecimal(String(count))} weights`;
}
