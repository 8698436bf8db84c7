import { isApiError } from '#src/lib/api/api-error.ts';
import { t } from '#src/lib/messages/t.ts';

/** What stands in the way before anything is sent. */
export type SignInFaults = { readonly email?: string; readonly password?: string };

/** @example checkSignIn('', 'x') // { email: 'Enter your e-mail address, …' } */
export function checkSignIn(email: string, password: string): SignInFaults {
  return {
    ...(/^[^\s@]+@[^\s@]+\.[^\s@]+$/.test(email.trim()) ? {} : { email: t('signIn.emailMissing') }),
    ...(password === '' ? { password: t('signIn.passwordMissing') } : {}),
  };
}

/** Why signing in failed, in words that give nothing away about which of the two was wrong. */
export function describeSignInError(error: unknown): string {
  if (isApiError(error, 'unauthenticated', 'validation')) return t('signIn.wrong');
  if (isApiError(error, 'unreachable')) return t('signIn.unreachable');
  return t('signIn.failed');
}
