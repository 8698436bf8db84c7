/** Every address of the client. A query's `undefined` parts are left out. */
const withQuery = (path: string, query: Readonly<Record<string, string | undefined>>): string => {
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) if (value !== undefined) search.set(name, value);
  const text = search.toString();
  return text === '' ? path : `${path}?${text}`;
};

export const paths = {
  first: () => '/',
  /** `to` = where to go after signing in. */
  signIn: (to?: string) => withQuery('/sign-in', { to: to === '/' ? undefined : to }),
  fleet: (query: Readonly<Record<string, string | undefined>> = {}) => withQuery('/fleet', query),
  pump: (pumpId: string, query: { readonly day?: string | undefined } = {}) =>
    withQuery(`/pumps/${encodeURIComponent(pumpId)}`, query),
  alarms: (query: Readonly<Record<string, string | undefined>> = {}) => withQuery('/alarms', query),
  alarm: (alarmId: string) => `/alarms/${encodeURIComponent(alarmId)}`,
  alarmHealth: (query: Readonly<Record<string, string | undefined>> = {}) => withQuery('/alarms/health', query),
  energy: (query: Readonly<Record<string, string | undefined>> = {}) => withQuery('/energy', query),
  padEnergy: (padId: string, query: { readonly month?: string | undefined } = {}) =>
    withQuery(`/energy/pads/${encodeURIComponent(padId)}`, query),
  rules: (query: { readonly for?: string | undefined } = {}) => withQuery('/settings/rules', query),
  settings: () => '/settings',
  tariffs: () => '/settings/tariffs',
  /** `new` = one that is not there yet; `from` = made from another. */
  tariff: (tariffId: string, query: { readonly from?: string | undefined } = {}) =>
    withQuery(`/settings/tariffs/${encodeURIComponent(tariffId)}`, query),
  myPump: (pumpId?: string) => withQuery('/my-pump', { pump: pumpId }),
  profile: () => '/profile',
} as const;
