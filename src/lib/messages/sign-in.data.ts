/** Signing in. */
export const SIGN_IN_MESSAGES = {
  'signIn.page': 'Sign in',
  'signIn.heading': 'Sign in to the watch desk',
  'signIn.email': 'E-mail address',
  'signIn.password': 'Password',
  'signIn.submit': 'Sign in',
  'signIn.submitting': 'Signing in…',
  'signIn.wrong': 'That address and password do not belong together. Check both and try again.',
  'signIn.throttled': 'Too many tries for this address. Try again in {wait}.',
  'signIn.throttledOver': 'You can try again now.',
  'signIn.unreachable': 'The server cannot be reached. Check this device’s network and try again.',
  'signIn.failed': 'The server could not sign you in just now. Try again in a minute.',
  'signIn.emailMissing': 'Enter your e-mail address, for example name@company.example.',
  'signIn.passwordMissing': 'Enter your password.',
  'signIn.returning': 'After that you come back to the page you asked for.',
  'signIn.watches': 'Millrace watches pump motors. It never starts, stops or sets one.',
} as const;
