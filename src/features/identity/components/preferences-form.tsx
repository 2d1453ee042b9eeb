import { Quantity } from '#src/components/ui/quantity.tsx';
import { Switch } from '#src/components/ui/switch.tsx';
import { setPreferences, usePreferences } from '#src/lib/preferences.ts';

/** How this reader likes the screen and its numbers; in force at once, kept in this browser. */
export function PreferencesForm() {
  const { theme, decimalMark, uncertainty } = usePreferences();
  return (
    <div className="flex flex-col gap-4">
      <Switch
        label="Light"
        value={theme}
        onChange={(value) => setPreferences({ theme: value })}
        choices={[
          { value: 'system', label: 'As the system' },
          { value: 'paper', label: 'Paper' },
          { value: 'lamp', label: 'Lamp' },
        ]}
      />
      <Switch
        label="Decimal sign"
        value={decimalMark}
        onChange={(value) => setPreferences({ decimalMark: value })}
        choices={[
          { value: '.', label: 'Point' },
          { value: ',', label: 'Comma' },
        ]}
      />
      <Switch
        label="Uncertainty"
        value={uncertainty}
        onChange={(value) => setPreferences({ uncertainty: value })}
        choices={[
          { value: 'plus-minus', label: 'Expanded, after the sign' },
          { value: 'concise', label: 'Standard, in brackets' },
        ]}
      />
      <p className="text-xl">
        <Quantity value="1000.0000123" expandedUncertainty="0.000003" coverageFactor="2" face="serif" />
      </p>
      <p className="text-sm text-ink-3">
        Kept in this browser. What is stored in the register does not change.
      </p>
    </div>
  );
}
