import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import type { Express } from 'express';
import type { Logger } from 'pino';
import { createApp } from './app.ts';
import { hashDeviceSecret } from './broker/device-credential.ts';
import type { Pools } from './db/pools.ts';
import { openDatabase } from './db/transaction.ts';
import type { Environment } from './env.ts';
import { mountAlarmHealthRoutes } from './features/alarm-health/index.ts';
import { mountAlarmRoutes } from './features/alarms/index.ts';
import { mountBacktestRoutes } from './features/backtests/index.ts';
import { mountChangeRoutes } from './features/changes/index.ts';
import { mountDeviceRoutes } from './features/devices/index.ts';
import { mountEnergyRoutes } from './features/energy/index.ts';
import { mountFleetRoutes } from './features/fleet/index.ts';
import { mountHealthRoutes } from './features/health/index.ts';
import { mountPumpRoutes } from './features/pumps/index.ts';
import { mountRuleRoutes } from './features/rules/index.ts';
import {
  type Authenticate,
  createAuthenticate,
  createEndedSessions,
  createSessionCookies,
  createSignInThrottle,
  type EndedSessions,
  mountSessionRoutes,
} from './features/session/index.ts';
import { mountTariffRoutes } from './features/tariffs/index.ts';
import { createMount } from './http/mount.ts';

/** What the rest of the process says of itself, for /api/health. */
export type WatchState = {
  readonly isBrokerUp: () => boolean;
  /** Seconds the fold is behind what is stored; undefined where nothing waits. */
  readonly findFoldLagSeconds: () => number | undefined;
};

export type ContainerOptions = {
  readonly env: Pick<Environment, 'publicUrl' | 'tokenKey' | 'deviceKey' | 'isDemo' | 'checksAnswers'> & {
    readonly http: Pick<Environment['http'], 'trustedProxies'>;
  };
  readonly pools: Pools;
  readonly log: Logger;
  readonly now: () => number;
  readonly watch: WatchState;
  readonly clientFolder?: string;
};

/** The HTTP side, and what live connections share with it. */
export type Container = {
  readonly app: Express;
  readonly authenticate: Authenticate;
  readonly endedSessions: EndedSessions;
};

const PROJECT = new URL('../', import.meta.url);

const { version }: { version: string } = JSON.parse(readFileSync(new URL('package.json', PROJECT), 'utf8'));

/** The one place that knows who needs whom. */
export function createContainer({ env, pools, log, now, watch, clientFolder }: ContainerOptions): Container {
  const { publicUrl, tokenKey, deviceKey, isDemo, checksAnswers } = env;
  const { app: appPool, machine } = pools;
  const endedSessions = createEndedSessions(now);
  const sessions = {
    machine,
    tokenKey,
    isDemo,
    now,
    log,
    endedSessions,
    cookies: createSessionCookies(publicUrl.startsWith('https:')),
    throttle: createSignInThrottle(machine),
  };
  const authenticate = createAuthenticate(sessions);
  const app = createApp({
    log,
    publicUrl,
    trustedProxies: env.http.trustedProxies,
    clientFolder: clientFolder ?? fileURLToPath(new URL('dist', PROJECT)),
    authenticate,
    mountRoutes: (router) => {
      const mount = createMount({ router, app: appPool, log, now, tokenKey, authenticate, checksAnswers });
      mountHealthRoutes(mount, { version, machineDb: openDatabase(machine), ...watch });
      mountSessionRoutes(mount, sessions, authenticate);
      mountFleetRoutes(mount);
      mountPumpRoutes(mount);
      mountEnergyRoutes(mount);
      mountTariffRoutes(mount);
      mountAlarmRoutes(mount);
      mountAlarmHealthRoutes(mount);
      mountDeviceRoutes(mount, { hashSecret: (secret) => hashDeviceSecret(deviceKey, secret) });
      mountRuleRoutes(mount);
      mountBacktestRoutes(mount);
      mountChangeRoutes(mount);
    },
  });
  return { app, authenticate, endedSessions };
}
