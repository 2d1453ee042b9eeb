import { useFormContext, useWatch } from 'react-hook-form';
import { Section } from '#src/components/layout/page.tsx';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import type { NoticeEntry } from '../notice-form.ts';

interface NoticeSignProps {
  password: string;
  onPassword: (password: string) => void;
  passwordError: string | undefined;
  isBusy: boolean;
  error: Error | null;
}

/** The signature: what will be fixed, in one sentence, and the password again. It is kept nowhere. */
export function NoticeSign({ password, onPassword, passwordError, isBusy, error }: NoticeSignProps) {
  const { control } = useFormContext<NoticeEntry>();
  const [number, effectiveOn] = useWatch({ control, name: ['number', 'effectiveOn'] });
  return (
    <Section title="Sign">
      <p className="text-ink-2">
        {`Notice ${number || 'without a number yet'} will be in force from ${effectiveOn || 'a day to be given'} in every chain of the network. It is never changed; a later notice may replace it.`}
      </p>
      <TextField
        label="Your password, as your signature"
        type="password"
        autoComplete="current-password"
        value={password}
        onChange={(event) => onPassword(event.target.value)}
        error={passwordError}
      />
      {error && <ErrorNotice error={error} hidesFields />}
      <p>
        <Button type="submit" weight="primary" isBusy={isBusy}>
          Publish the notice
        </Button>
      </p>
    </Section>
  );
}
