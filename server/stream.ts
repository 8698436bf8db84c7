import { readFileSync } from 'node:fs';
import pg from 'pg';
import type { Logger } from 'pino';
import { createDeviceBroker, type DeviceBroker } from './broker/device-broker.ts';
import { listCommissionedPumps } from './db/commissioned-pumps.ts';
import { deriveRoleUrl } from './db/database-roles.ts';
import { makeReadingPartitions } from './db/reading-partitions.ts';
import { openDatabase } from './db/transaction.ts';
import type { Environment } from './env.ts';
import { createFold, type Fold, type FoldCounts } from './fold/fold.ts';
import { createListening } from './fold/listening.ts';
import { chooseEpoch, holdEpoch } from './fold/ownership.ts';
import { createDeviceDirectory, type DeviceDirectory } from './ingest/device-directory.ts';
import { createIngest, type Ingest, type IngestCounts } from './ingest/ingest.ts';
import { listKnownDevices } from './ingest/known-devices-repository.ts';
import type { Doorbell } from './live/doorbell.ts';
import { createRinger } from './live/ringer.ts';

export type StreamOptions = {
  readonly env: Pick<Environment, 'databaseUrl' | 'publicUrl' | 'deviceKey' | 'mqtt'>;
  /** The machine role's pool, for what is not in a hurry. */
  readonly machine: pg.Pool;
  /** Hears the database's doorbell; started by whoever made it, after `start` was called here. */
  readonly doorbell: Doorbell;
  readonly log: Logger;
  readonly now: () => number;
  /** The clock whose jumps mean that the process stood still; `now` where nobody moves that by hand. */
  readonly wallClock?: () => number;
  /** How long each message took from its arrival until what it means was committed, ms. */
  readonly onFolded?: (lagsMs: readonly number[]) => void;
};

/** From the devices' door to the alarms: broker, ingest and fold. Nothing runs before `start`. */
export type Stream = {
  /** Answers the port on which devices are served. */
  readonly start: (onProgress?: (text: string) => void) => Promise<number>;
  /** Stops in order: no new message, what was received is answered, then connections close. */
  readonly stop: () => Promise<void>;
  readonly isUp: () => boolean;
  /** Resolves when everything received is answered and understood. */
  readonly drain: () => Promise<void>;
  /** Time passes: it does so by itself every few seconds. */
  readonly tick: () => void;
  readonly count: () => { readonly connected: number; readonly ingest: IngestCounts; readonly fold: FoldCounts };
};

type Parts = {
  readonly broker: DeviceBroker;
  readonly directory: DeviceDirectory;
  readonly ingest: Ingest;
  readonly fold: Fold;
  readonly pools: readonly pg.Pool[];
};

const STATEMENT_MS = 10_000;
const SWEEP_MS = 30_000;

/** Wires the stream; connections are opened when they are needed. */
export function createStream(options: StreamOptions): Stream {
  const { machine, doorbell, log, now } = options;
  const parts = createParts(options);
  const { broker, ingest, fold, pools } = parts;
  const listening = createListening({
    pool: machine,
    onTick: fold.tick,
    onGap: fold.listenAgain,
    now: options.wallClock ?? now,
    log,
  });
  let sweeper: NodeJS.Timeout | undefined;
  let isUp = false;
  return {
    isUp: () => isUp,
    drain: async () => {
      await ingest.drain();
      await fold.drain();
    },
    tick: fold.tick,
    count: () => ({ connected: broker.countConnected(), ingest: ingest.count(), fold: fold.counts() }),
    start: async (onProgress = () => undefined) => {
      await makeReadingPartitions(machine);
      listenForChanges(doorbell, parts, log);
      await listening.start();
      onProgress('Taking up what was stored');
      await fold.start();
      const port = await broker.start();
      sweeper = setInterval(fold.sweep, SWEEP_MS);
      isUp = true;
      onProgress(`Devices are served on ${options.env.mqtt.host}:${port}`);
      return port;
    },
    stop: async () => {
      isUp = false;
      clearInterval(sweeper);
      broker.quiesce();
      await ingest.drain();
      await fold.drain();
      await broker.stop();
      await fold.stop();
      await listening.stop();
      await Promise.all(pools.map((pool) => pool.end()));
    },
  };
}

function createParts({ env, machine, log, now, onFolded }: StreamOptions): Parts {
  const epoch = chooseEpoch();
  const ingestPool = openEpochPool(env.databaseUrl, epoch, 2, log);
  const foldPool = openEpochPool(env.databaseUrl, epoch, 3, log);
  const ringer = createRinger(machine, log);
  const directory = createDeviceDirectory({ load: (serials) => listKnownDevices(machine, serials), now });
  const fold = createFold({
    pool: foldPool,
    epoch,
    publicUrl: env.publicUrl,
    listPumps: (pumpIds) => listCommissionedPumps(openDatabase(machine), pumpIds),
    onNews: ringer.ring,
    onFolded: onFolded ?? (() => undefined),
    now,
    log,
  });
  const ingest = createIngest({
    pool: ingestPool,
    findDevice: directory.peek,
    onStored: fold.accept,
    onUncertain: fold.doubt,
    sendNotice: (serial, notice) => broker.sendNotice(serial, notice),
    now,
    log,
  });
  const broker: DeviceBroker = createDeviceBroker({
    host: env.mqtt.host,
    port: env.mqtt.port,
    tls: readTls(env.mqtt),
    deviceKey: env.deviceKey,
    findCredential: directory.find,
    receive: ingest.receive,
    onSignedIn: (serial) => {
      const pumpId = directory.peek(serial)?.pump?.id;
      if (pumpId !== undefined) fold.own(pumpId);
    },
    now,
    log,
  });
  return { broker, directory, ingest, fold, pools: [ingestPool, foldPool] };
}

/** Connections that say, for as long as they live, that the process with this epoch does. */
function openEpochPool(databaseUrl: string, epoch: number, max: number, log: Logger): pg.Pool {
  const pool = new pg.Pool({
    connectionString: deriveRoleUrl(databaseUrl, 'millrace_machine'),
    application_name: 'millrace stream',
    max,
    idleTimeoutMillis: 0,
    connectionTimeoutMillis: STATEMENT_MS,
    statement_timeout: STATEMENT_MS,
    onConnect: (client) => holdEpoch(client, epoch),
  });
  const onError = (err: Error) => log.warn({ err }, 'a database connection broke');
  pool.on('error', onError);
  // The same for one that is in use: its query fails, and the event must not end the process either.
  pool.on('connect', (client) => client.on('error', onError));
  return pool;
}

function readTls({ tlsKeyFile, tlsCertificateFile }: Environment['mqtt']) {
  if (tlsKeyFile === undefined || tlsCertificateFile === undefined) return undefined;
  return { key: readFileSync(tlsKeyFile, 'utf8'), certificate: readFileSync(tlsCertificateFile, 'utf8') };
}

function listenForChanges(doorbell: Doorbell, { broker, directory, fold }: Parts, log: Logger): void {
  const refresh = (): void => {
    directory.refresh().then(
      (serials) => serials.forEach(broker.closeDevice),
      (err: unknown) => log.warn({ err }, 'could not read the devices anew'),
    );
  };
  doorbell.on('millrace_credentials', refresh);
  doorbell.on('millrace_context', (payload) => {
    refresh();
    fold.recommission(payload === undefined || payload === '' ? undefined : payload.split(','));
  });
}
