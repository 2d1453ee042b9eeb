import { Link } from 'react-router';
import type { StandardResponse } from '#shared/contracts/standards.ts';
import { paths } from '#src/app/paths.ts';
import { Facts } from '#src/components/layout/facts.tsx';
import { Quantity } from '#src/components/ui/quantity.tsx';
import { PROPERTIES } from '../words.ts';
import { limitUnit } from './error-limit-note.tsx';
import { PropertyValue } from './property-value.tsx';

/** What the standard is, apart from its values. */
export function IdentityFacts({ sheet }: { sheet: StandardResponse }) {
  const { standard, maximumPermissibleError: limit } = sheet;
  return (
    <Facts
      facts={[
        ['Registry number', <span className="font-mono text-sm">{standard.registryNo}</span>],
        ['Marking', standard.serial ? `${standard.marking}, serial ${standard.serial}` : standard.marking],
        ['Set', standard.set && <SetLink registryNo={standard.set.registryNo} />],
        ['Shape', standard.shape],
        ['Material', standard.material],
        ...sheet.properties.map(
          (property) => [PROPERTIES[property.kind].name, <PropertyValue property={property} />] as const,
        ),
        ['Error limit', limit && <ErrorLimit limit={limit} />],
        ['Manufacturer', standard.manufacturer],
      ]}
    />
  );
}

function SetLink({ registryNo }: { registryNo: string }) {
  return (
    <Link
      to={`${paths.standards.href()}?q=${encodeURIComponent(registryNo)}`}
      className="font-mono text-sm underline underline-offset-3"
    >
      {registryNo}
    </Link>
  );
}

/** Table 1 of OIML R 111-1:2004; a third of it limits U (5.2), said in words since 0.5/3 has no end. */
function ErrorLimit({ limit }: { limit: string }) {
  return (
    <>
      <span className="font-serif">±</span>
      <Quantity value={limit} shownIn={limitUnit(limit)} />; a third of it for U
    </>
  );
}
