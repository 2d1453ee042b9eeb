import { Fragment, type ReactNode } from 'react';

interface FactsProps {
  /** Name and value of each fact; a fact whose value is null or undefined is left out. */
  facts: readonly (readonly [name: ReactNode, value: ReactNode])[];
}

/** What is known about a thing, name beside value. */
export function Facts({ facts }: FactsProps) {
  const known = facts.filter(([, value]) => value !== null && value !== undefined);
  return (
    <dl className="grid grid-cols-[minmax(5rem,max-content)_minmax(0,1fr)] gap-x-4 gap-y-1">
      {known.map(([name, value], index) => (
        <Fragment key={index}>
          <dt className="text-ink-2">{name}</dt>
          <dd className="min-w-0 break-words">{value}</dd>
        </Fragment>
      ))}
    </dl>
  );
}
