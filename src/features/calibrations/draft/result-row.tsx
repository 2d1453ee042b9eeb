import { memo, useId } from 'react';
import { useFormContext, useWatch } from 'react-hook-form';
import { Button } from '#src/components/ui/button.tsx';
import { Cell, Row } from '#src/components/ui/table.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { useDraft } from './draft-context.ts';
import type { DraftValues } from './draft-values.ts';
import { useKnown } from './known.ts';
import { LineDetail } from './line-detail.tsx';
import { MassCell } from './mass-cell.tsx';
import { usePointAt } from './point-at.ts';
import { StandardBox } from './standard-box.tsx';
import { UnknownWeight } from './unknown-weight.tsx';

interface ResultRowProps {
  at: number;
  lineKey: string;
  /** What a pasted row called the weight, where none was found by that name. */
  pastedName: string | undefined;
  isOpen: boolean;
  /** Opens the line with this key; null closes. */
  onOpen: (key: string | null) => void;
  onRemove: (at: number) => void;
}

/** One result: weight, value, U, k and reference in a row, everything else of it below when opened. */
export const ResultRow = memo(function ResultRow(props: ResultRowProps) {
  const { at, lineKey, pastedName, isOpen, onOpen, onRemove } = props;
  const { control, register, setValue } = useFormContext<DraftValues>();
  const line = useWatch({ control, name: `lines.${at}` });
  const errorOf = usePointAt();
  const { isLocked } = useDraft();
  const known = useKnown();
  const detailId = useId();
  // A line just removed is drawn once more before its row goes.
  if (!line) return null;
  const standard = known.standards.get(line.standardId ?? '');
  const path = `lines.${at}` as const;
  const name = standard ? `${standard.registryNo}, ${standard.marking}` : `line ${at + 1}`;
  return (
    <>
      <Row className="align-top">
        <Cell isHeading>
          <div data-field={`${path}.standardId`} className="flex min-w-28 items-baseline gap-2 pt-1">
            <span className="w-4 shrink-0 text-right text-sm text-ink-3">{at + 1}</span>
            {standard ? (
              <span className="whitespace-nowrap">
                {standard.marking}{' '}
                <span className="block font-mono text-xs text-ink-2">{standard.registryNo}</span>
              </span>
            ) : line.standardId ? (
              <UnknownWeight
                standardId={line.standardId}
                onRemove={isLocked ? null : () => setValue(`${path}.standardId`, null, { shouldDirty: true })}
              />
            ) : isLocked ? (
              <span className="text-ink-2">no weight named</span>
            ) : (
              <StandardBox
                label={`Weight of line ${at + 1}`}
                isLabelHidden
                hint={pastedName && `pasted as ${pastedName}`}
                className="w-36"
                onChosen={([weight]) =>
                  weight && setValue(`${path}.standardId`, weight.id, { shouldDirty: true })
                }
              />
            )}
          </div>
        </Cell>
        <Cell align="right">
          <div data-field={`${path}.value`} className="ml-auto w-38">
            <MassCell
              at={at}
              part="value"
              label={`Value of ${name}`}
              isLocked={isLocked}
              error={errorOf(`${path}.value`)}
            />
          </div>
        </Cell>
        <Cell align="right">
          <div data-field={`${path}.expandedU`} className="ml-auto w-28">
            {line.uNotStated ? (
              <span className="block pt-1.5 text-ink-2">not stated</span>
            ) : (
              <MassCell
                at={at}
                part="expandedU"
                label={`U of ${name}`}
                isLocked={isLocked}
                error={errorOf(`${path}.expandedU`)}
              />
            )}
          </div>
        </Cell>
        <Cell align="right">
          <div data-field={`${path}.k`} className="ml-auto w-12 [&_input]:text-right">
            {!line.uNotStated && (
              <TextField
                label={`k of ${name}`}
                isLabelHidden
                isMono
                inputMode="decimal"
                autoComplete="off"
                maxLength={20}
                readOnly={isLocked}
                error={errorOf(`${path}.k`)}
                {...register(`${path}.k`)}
              />
            )}
          </div>
        </Cell>
        <Cell>
          <div className="pt-1">
            <ReferenceSummary uids={line.references.map(({ valueUid }) => valueUid)} />
          </div>
        </Cell>
        <Cell className="text-right">
          <Button
            weight="text"
            aria-expanded={isOpen}
            aria-controls={detailId}
            aria-label={`${isOpen ? 'Less' : 'More'} of ${name}`}
            onClick={() => onOpen(isOpen ? null : lineKey)}
          >
            {isOpen ? 'Less' : 'More'}
          </Button>
        </Cell>
      </Row>
      {isOpen && (
        <tr id={detailId}>
          <td colSpan={6} className="border-b border-rule bg-raised px-3 py-3">
            <div className="max-rail:sticky max-rail:left-3 max-rail:w-[calc(100vw-4rem)]">
              <fieldset disabled={isLocked}>
                <LineDetail at={at} line={line} standard={standard} onRemove={() => onRemove(at)} />
              </fieldset>
            </div>
          </td>
        </tr>
      )}
    </>
  );
});

function ReferenceSummary({ uids }: { uids: readonly string[] }) {
  const known = useKnown();
  if (uids.length === 0) return <span className="whitespace-nowrap text-ink-3">none named</span>;
  return uids.map((uid) => {
    const reference = known.references.get(uid);
    return (
      <span key={uid} className="block whitespace-nowrap">
        {reference ? (
          <>
            <span className="font-mono text-sm">{reference.registryNo}</span>
            <span className="block text-xs text-ink-2">{reference.performedEnd}</span>
          </>
        ) : (
          'not loaded yet'
        )}
      </span>
    );
  });
}
