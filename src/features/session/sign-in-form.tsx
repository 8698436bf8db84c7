import { type FormEvent, useState } from 'react';
import { Button } from '#src/components/ui/button.tsx';
import { Field } from '#src/components/ui/field.tsx';
import { isApiError } from '#src/lib/api/api-error.ts';
import { t } from '#src/lib/messages/t.ts';
import { checkSignIn, describeSignInError, type SignInFaults } from './sign-in-view.ts';
import { ThrottleNotice } from './throttle-notice.tsx';
import { useSignIn } from './use-sign-in.ts';

const LONG_WAIT_SECONDS = 60;

/** Address and password. What was typed stays when the server says no. */
export function SignInForm({ onSignedIn }: { readonly onSignedIn: () => void }) {
  const signIn = useSignIn();
  const [faults, setFaults] = useState<SignInFaults>({});
  const submit = (event: FormEvent<HTMLFormElement>) => {
    event.preventDefault();
    const form = new FormData(event.currentTarget);
    const email = String(form.get('email') ?? '').trim();
    const password = String(form.get('password') ?? '');
    const found = checkSignIn(email, password);
    setFaults(found);
    const first = Object.keys(found)[0];
    if (first === undefined) signIn.mutate({ email, password }, { onSuccess: onSignedIn });
    else event.currentTarget.querySelector<HTMLInputElement>(`[name="${first}"]`)?.focus();
  };
  const { error } = signIn;
  return (
    <form onSubmit={submit} noValidate className="flex flex-col gap-5">
      <Field
        label={t('signIn.email')}
        name="email"
        type="email"
        autoComplete="username"
        inputMode="email"
        error={faults.email}
      />
      <Field
        label={t('signIn.password')}
        name="password"
        type="password"
        autoComplete="current-password"
        error={faults.password}
      />
      {error === null ? null : (
        <p role="alert" className="border border-p1 bg-p1-ground px-4 py-3 font-medium text-p1">
          {isApiError(error, 'rate-limited') ? (
            <ThrottleNotice key={signIn.submittedAt} seconds={error.retryAfterSeconds ?? LONG_WAIT_SECONDS} />
          ) : (
            describeSignInError(error)
          )}
        </p>
      )}
      <Button type="submit" look="main" touch disabled={signIn.isPending}>
        {signIn.isPending ? t('signIn.submitting') : t('signIn.submit')}
      </Button>
    </form>
  );
}
