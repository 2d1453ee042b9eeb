import type { ReactNode } from 'react';
import { Link } from 'react-router';
import type { QuantityKind } from '#shared/contracts/common.ts';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { paths } from '#src/app/paths.ts';
import { Toolbar, TwoColumns } from '#src/components/layout/columns.tsx';
import { Facts } from '#src/components/layout/facts.tsx';
import { Page, Section } from '#src/components/layout/page.tsx';
import { DateText } from '#src/components/ui/date-text.tsx';
import { formatDecimal } from '#shared/numbers/format-decimal.ts';
import { nominalText } from '#shared/numbers/nominal.ts';
import { KIND_WORDS, monthsText } from '../words.ts';
import { DueMark } from './due-mark.tsx';
import { EpochSection } from './epoch-section.tsx';
import { HistorySection } from './history-section.tsx';
import { IdentityFacts } from './identity-facts.tsx';
import { ValueNote, ValueOfRecord } from './value-of-record.tsx';

interface StandardPageProps {
  sheet: StandardResponse;
  quantity: QuantityKind;
  onQuantity: (quantity: QuantityKind) => void;
  /** Where one can go from here, the primary way first. */
  actions: ReactNode;
}

/** One standard: what it is worth, how it got there, what it is, who relies on it. */
export function StandardPage({ sheet, quantity, onQuantity, actions }: StandardPageProps) {
  const { standard, epochs } = sheet;
  const nominal = nominalText(standard.nominal);
  return (
    <Page
      title={`${standard.registryNo}, ${nominal}${standard.class ? `, class ${standard.class}` : ''}`}
      sub={
        <>
          <Link to={paths.laboratory.href(standard.holder.id)} className="hover:underline">
            {standard.holder.name}
          </Link>
          {` · ${KIND_WORDS[standard.kind]}`}
          {` · ${standard.state}`}
          {standard.inServiceFrom && ` since ${standard.inServiceFrom}`}
          {epochs.length > 1 && ` · epoch ${epochs.length}`}
        </>
      }
      value={standard.value && <ValueOfRecord nominal={standard.nominal} value={standard.value} />}
      valueNote={standard.value ? <ValueNote sheet={sheet} value={standard.value} /> : undefined}
    >
      <TwoColumns
        sideWidth="narrow"
        side={
          <>
            <Section title="Identity">
              <IdentityFacts sheet={sheet} />
            </Section>
            <Section title="Programme">
              <Programme programme={sheet.programme} />
            </Section>
            <EpochSection sheet={sheet} />
            <Section title="Leans on this">
              <Leaning leansOnThis={sheet.leansOnThis} />
            </Section>
            <Toolbar>{actions}</Toolbar>
          </>
        }
      >
        <HistorySection sheet={sheet} quantity={quantity} onQuantity={onQuantity} firstStep={null} />
      </TwoColumns>
    </Page>
  );
}

function Programme({ programme }: { programme: StandardResponse['programme'] }) {
  if (!programme) return <p className="text-ink-2">The holder has stated no recalibration interval.</p>;
  return (
    <Facts
      facts={[
        ['Of', programme.laboratory.name],
        ['Interval', `${monthsText(programme.intervalMonths)}, ${programme.method}`],
        ['Next due', programme.dueOn ? <DueMark dueOn={programme.dueOn} /> : 'after the first calibration'],
        ['Reason', programme.justification || null],
      ]}
    />
  );
}

function Leaning({ leansOnThis }: Pick<StandardResponse, 'leansOnThis'>) {
  const { weights, laboratories, newestUse } = leansOnThis;
  if (weights === 0) return <p className="text-ink-2">No value in the register leans on this standard.</p>;
  const count = (number: number, one: string, many: string) =>
    `${formatDecimal(String(number))} ${number === 1 ? one : many}`;
  return (
    <Facts
      facts={[
        [
          'Weights',
          `${count(weights, 'weight', 'weights')} in ${count(laboratories, 'laboratory', 'laboratories')}`,
        ],
        ['Newest use', newestUse && <DateText value={newestUse} />],
      ]}
    />
  );
}
