import { SignInBody } from '#shared/contracts/identity.ts';
import { Button } from '#src/components/ui/button.tsx';
import { ErrorNotice } from '#src/components/ui/error-notice.tsx';
import { TextField } from '#src/components/ui/text-field.tsx';
import { errorAt, showFieldProblems, useZodForm } from '#src/lib/form.ts';
import { useSignIn } from '../api.ts';

/** E-mail and password. A refusal does not say which of the two was wrong, so that accounts cannot be probed. */
export function SignInForm({ onSignedIn }: { onSignedIn: () => void }) {
  const form = useZodForm(SignInBody, { defaultValues: { email: '', password: '' } });
  const signIn = useSignIn();
  const { errors } = form.formState;

  const submit = form.handleSubmit((body) =>
    signIn.mutateAsync(body).then(onSignedIn, (error: unknown) => {
      showFieldProblems(error, form);
      form.setFocus('password');
    }),
  );

  return (
    <form noValidate onSubmit={(event) => void submit(event)} className="flex flex-col gap-4">
      <TextField
        label="E-mail"
        type="email"
        autoComplete="username"
        autoFocus
        error={errorAt(errors, 'email')}
        {...form.register('email')}
      />
      <TextField
        label="Password"
        type="password"
        autoComplete="current-password"
        error={errorAt(errors, 'password')}
        {...form.register('password')}
      />
      {signIn.error && <ErrorNotice error={signIn.error} hidesFields />}
      <div>
        <Button type="submit" weight="primary" isBusy={signIn.isPending}>
          Sign in
        </Button>
      </div>
    </form>
  );
}
