import { decodeNotice, type Notice } from '#shared/contract/mqtt/notice.ts';
import { encodeSettings, type MotorSettings } from '#shared/contract/mqtt/settings.ts';
import { encodeStatus } from '#shared/contract/mqtt/status.ts';
import type { Connection, OpenConnection } from '#simulator/link.ts';
import type { News } from '#simulator/virtual-pump.ts';
import { createDeviceIdentity, type IdentityOptions } from './device-identity.ts';
import { createOutgoing } from './outgoing.ts';

export type DeviceReport = { readonly serial: string } & (
  | { readonly kind: 'connected' }
  | { readonly kind: 'refused'; readonly reason: string }
  | ({ readonly kind: 'notice' } & Notice)
);

export type NetworkedDeviceOptions = {
  readonly port: number;
  readonly serial: string;
  readonly secret: string;
  readonly identity: Pick<IdentityOptions, 'firmware' | 'storySeed' | 'connectionSeed'>;
  readonly now: () => number;
  readonly openConnection: OpenConnection;
  readonly schedule: (delayMs: number, task: () => void) => { readonly cancel: () => void };
  readonly report: (report: DeviceReport) => void;
};

export type NetworkedDevice = { readonly hear: (news: News) => void; readonly close: () => Promise<void> };

const RETRY_MS = { first: 1000, most: 30_000, refused: 60_000 };

/** A device on a real link: connects while it is up, stores while it is not, and sends again what nobody stored. */
export function createNetworkedDevice(options: NetworkedDeviceOptions): NetworkedDevice {
  const { serial, report } = options;
  const identity = createDeviceIdentity({ ...options.identity, serial });
  const outgoing = createOutgoing();
  let connection: Connection | undefined;
  let isOpen = false;
  let up = false;
  let linkUp = true;
  let settings: MotorSettings | undefined;
  let retryMs = RETRY_MS.first;
  let retry: { readonly cancel: () => void } | undefined;
  let closed = false;

  const flush = () => {
    for (let message = isOpen ? outgoing.next() : undefined; message !== undefined; message = outgoing.next()) {
      const sent = message;
      connection?.publish('readings', sent.payload, () => {
        outgoing.acknowledge(sent);
        flush();
      });
    }
  };

  const open = () => {
    if (connection !== undefined || closed || !up || !linkUp) return;
    const id = identity.nextConnection();
    connection = options.openConnection({
      port: options.port,
      serial,
      secret: options.secret,
      will: encodeStatus({ state: 'lost', connection: id }),
      onOpen: () => {
        isOpen = true;
        retryMs = RETRY_MS.first;
        report({ serial, kind: 'connected' });
        connection?.publish('status', encodeStatus(identity.online(id, options.now())));
        if (settings !== undefined) connection?.publish('settings', encodeSettings(settings));
        flush();
      },
      onRefused: (reason) => {
        retryMs = RETRY_MS.refused;
        report({ serial, kind: 'refused', reason });
      },
      onNotice: (payload) => {
        const notice = decodeNotice(payload);
        if (notice !== undefined) report({ serial, kind: 'notice', ...notice });
      },
      onClosed: () => {
        connection = undefined;
        isOpen = false;
        outgoing.takeBack();
        comeBack();
      },
    });
  };

  const comeBack = () => {
    if (closed) return;
    retry?.cancel();
    retry = options.schedule(retryMs * identity.between(70, 130) * 0.01, open);
    retryMs = Math.max(retryMs, Math.min(RETRY_MS.most, retryMs * 2));
  };

  const follow = () => {
    if (up && linkUp) open();
    else connection?.cut();
  };

  return {
    hear: (news) => {
      if (news.kind === 'reading') outgoing.add(news.reading);
      else if (news.kind === 'settings') {
        settings = news.settings;
        if (isOpen) connection?.publish('settings', encodeSettings(settings));
      } else if (news.kind === 'device') {
        up = news.up;
        if (up) identity.boot(news.boot, news.since);
        follow();
      } else if (news.kind === 'link') {
        linkUp = news.up;
        follow();
      }
      flush();
    },
    close: async () => {
      closed = true;
      retry?.cancel();
      await connection?.end();
    },
  };
}
