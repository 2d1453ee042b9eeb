import { Checkbox } from '#src/components/ui/checkbox.tsx';
import { DayField } from '#src/components/ui/day-field.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
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
        label="Links"
        value={question.as}
        onChange={(as) => onChange({ as })}
        choices={[
          { value: 'certified', label: 'As certified' },
          { value: 'now known', label: 'As now known' },
        ]}
      />
      <Switch
        label="Judged by"
        value={question.verdict}
        onChange={(verdict) => onChange({ verdict })}
        choices={[
          { value: 'today', label: 'Known now' },
          { value: 'conduct', label: 'Known at use' },
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
