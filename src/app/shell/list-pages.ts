import type { Role } from '#shared/contract/primitives.ts';
import type { MessageKey } from '#src/lib/messages/t.ts';
import { paths } from '#src/lib/paths.ts';

export type NavigationPage = {
  readonly to: string;
  readonly label: Extract<
    MessageKey,
    'shell.fleet' | 'shell.alarms' | 'shell.energy' | 'shell.settings' | 'shell.myPump'
  >;
};

const FLEET: NavigationPage = { to: paths.fleet(), label: 'shell.fleet' };
const ALARMS: NavigationPage = { to: paths.alarms(), label: 'shell.alarms' };
const ENERGY: NavigationPage = { to: paths.energy(), label: 'shell.energy' };
const SETTINGS: NavigationPage = { to: paths.settings(), label: 'shell.settings' };
const MY_PUMP: NavigationPage = { to: paths.myPump(), label: 'shell.myPump' };

/** The pages each role has, the first of them where it starts. Only pages that exist are named. */
const PAGES: Readonly<Record<Role, readonly [NavigationPage, ...NavigationPage[]]>> = {
  manager: [FLEET, ALARMS, ENERGY, SETTINGS],
  technician: [ALARMS, FLEET],
  homeowner: [MY_PUMP],
};

/** @example listPages('homeowner').map(({ to }) => to) // ['/my-pump'] */
export const listPages = (role: Role): readonly NavigationPage[] => PAGES[role];

/** @example firstPage('technician') // '/alarms' */
export const firstPage = (role: Role): string => PAGES[role][0].to;
