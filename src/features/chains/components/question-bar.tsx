import { useState } from 'react';
import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { DateField } from '#src/components/ui/text-field.tsx';
import { Toolbar } from '#src/components/layout/columns.tsx';
import type { ChainQuestion } from '../question.ts';

interface QuestionBarProps {
  question: ChainQuestion;
  /** The days the answer is about, where the address names none. */
  answered: { day: string; known: string };
  onChange: (change: Partial<ChainQuestion>) => void;
}

/** The day, the knowledge day, and how the answer is drawn. */
export function QuestionBar({ question, answered, onChange }: QuestionBarProps) {
  return (
    <Toolbar label="What is asked of the chain">
      <DayField label="In force on" value={question.day ?? answered.day} onDay={(day) => onChange({ day })} />
      <DayField
        label="As known on"
        value={question.known ?? answered.known}
        onDay={(known) => onChange({ known })}
      />
      <Switch
        label="Judged by"
        value={question.verdict}
        onChange={(verdict) => onChange({ verdict })}
        choices={[
          { value: 'today', label: 'What is known now' },
          { value: 'conduct', label: 'What was known at use' },
        ]}
      />
      <Switch
        label="Drawing"
        isLabelHidden
        value={question.draw}
        onChange={(draw) => onChange({ draw })}
        choices={[
          { value: 'flow', label: 'Flow' },
          { value: 'plain', label: 'Plain' },
        ]}
      />
      <Checkbox
        label="Small shared effects"
        checked={question.effects === 'all'}
        onChange={(event) => onChange({ effects: event.target.checked ? 'all' : 'main' })}
      />
      <Checkbox
        label="Only what fails"
        checked={question.only === 'fails'}
        onChange={(event) => onChange({ only: event.target.checked ? 'fails' : undefined })}
      />
    </Toolbar>
  );
}

const DAY = /^\d{4}-\d{2}-\d{2}$/;

/** Asks anew once a whole day stands there; a day that is none is said, and nothing is asked. */
function DayField({
  label,
  value,
  onDay,
}: {
  label: string;
  value: string;
  onDay: (day: string | undefined) => void;
}) {
  const [typed, setTyped] = useState<string | null>(null);
  const [error, setError] = useState<string | undefined>();
  const settle = () => {
    if (typed === null) return;
    const text = typed.trim();
    const isDay =
      DAY.test(text) && !Number.isNaN(Date.parse(text)) && new Date(text).toISOString().startsWith(text);
    if (text !== '' && !isDay) {
      setError(`"${text}" is no day. Write it as 2025-02-20.`);
      return;
    }
    setError(undefined);
    setTyped(null);
    if (text !== value) onDay(text === '' ? undefined : text);
  };
  return (
    <DateField
      label={label}
      value={typed ?? value}
      error={error}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={settle}
      onKeyDown={(event) => event.key === 'Enter' && settle()}
    />
  );
}
