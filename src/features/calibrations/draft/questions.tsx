import { useFormContext } from 'react-hook-form';
import type { OpenPoint } from '#shared/contracts/drafts.ts';
import type { MassUnit } from '#shared/contracts/common.ts';
import { Button } from '#src/components/ui/button.tsx';
import { Notice } from '#src/components/ui/notice.tsx';
import { unitSymbol } from '#shared/numbers/quantity-text.ts';
import { useDraft } from './draft-context.ts';
import type { DraftValues } from './draft-values.ts';
import { fieldWords, lineOf } from './field-words.ts';
import { ownUnit } from './own-unit.ts';
import { turned } from './paste-lines.ts';

const SMALLER: Record<MassUnit, MassUnit | null> = { kg: 'g', g: 'mg', mg: 'ug', ug: null };

interface QuestionsProps {
  points: readonly OpenPoint[];
  weightOf: (line: number) => string | null;
}

/** Values that look like a slip, each put as a question with its two answers. */
export function Questions({ points, weightOf }: QuestionsProps) {
  const questions = points.filter(({ kind }) => kind === 'question');
  return questions.map((point, index) => (
    <Question key={`${point.field} ${index}`} point={point} title={fieldWords(point.field, weightOf)} />
  ));
}

function Question({ point, title }: { point: OpenPoint; title: string }) {
  const { getValues, setValue } = useFormContext<DraftValues>();
  const { goTo, isLocked } = useDraft();
  const at = lineOf(point.field);
  if (at === null) return null;
  const path = `lines.${at}` as const;
  const isSign = point.asks === 'sign';
  const value = ownUnit(getValues(`${path}.value`), getValues(`${path}.unit`));
  const smaller = SMALLER[value.unit];

  function keep(): void {
    setValue(isSign ? `${path}.signConfirmed` : `${path}.unitConfirmed`, true, { shouldDirty: true });
  }
  function turn(): void {
    setValue(`${path}.value`, turned(getValues(`${path}.value`)), { shouldDirty: true });
  }
  function shrink(unit: MassUnit): void {
    const U = ownUnit(getValues(`${path}.expandedU`), getValues(`${path}.uUnit`));
    // A slip of the unit is made for value and U together, as they stand on one line of the certificate.
    if (U.unit === value.unit) {
      setValue(`${path}.expandedU`, U.text, { shouldDirty: true });
      setValue(`${path}.uUnit`, unit, { shouldDirty: true });
    }
    // The unit written beside the number, if there was one, gives way to the answer.
    setValue(`${path}.value`, value.text, { shouldDirty: true });
    setValue(`${path}.unit`, unit, { shouldDirty: true });
  }

  return (
    <Notice
      tone="caution"
      title={
        <>
          {isSign ? 'Is the sign right?' : 'Is the unit right?'}{' '}
          <span className="font-normal text-ink-2">{title}</span>
        </>
      }
      answers={
        !isLocked && (
          <>
            {isSign ? (
              <Button weight="text" onClick={turn}>
                Turn the sign
              </Button>
            ) : smaller ? (
              <Button weight="text" onClick={() => shrink(smaller)}>
                It is in {unitSymbol(smaller)}
              </Button>
            ) : (
              <Button weight="text" onClick={() => goTo(point.field)}>
                Mend the value
              </Button>
            )}
            <Button weight="text" onClick={keep}>
              It is right, keep it
            </Button>
          </>
        )
      }
    >
      {point.message}
      {point.clause && ` (${point.clause})`}
    </Notice>
  );
}
