import type { DeviceStatus } from '#shared/domain/fold/pump-event.ts';

/** What one batch changes of a device's own row. */
export type DeviceTouch = {
  readonly deviceId: string;
  heardAt: number;
  state: 'online' | undefined;
  connection: string | undefined;
  boot: string | undefined;
  firmware: string | undefined;
  /** A will: the device is lost only if this is still its connection. */
  lostConnection: string | undefined;
  refused: number;
};

/** Gathers what a batch says of devices, one record a device however many messages it sent. */
export type DeviceTouches = {
  readonly hear: (deviceId: string, at: number) => DeviceTouch;
  readonly takeStatus: (deviceId: string, at: number, status: DeviceStatus) => void;
  readonly list: () => DeviceTouch[];
};

/** No device touched yet. */
export function createDeviceTouches(): DeviceTouches {
  const touches = new Map<string, DeviceTouch>();
  const hear = (deviceId: string, at: number): DeviceTouch => {
    const touch = touches.get(deviceId) ?? emptyTouch(deviceId);
    touch.heardAt = Math.max(touch.heardAt, at);
    touches.set(deviceId, touch);
    return touch;
  };
  return {
    hear,
    takeStatus: (deviceId, at, status) => {
      const touch = hear(deviceId, at);
      // A take-over publishes the will of the old connection late: it must not call the new one lost.
      if (status.state === 'lost') {
        if (touch.connection === undefined || touch.connection === status.connection) {
          touch.lostConnection = status.connection;
        }
        return;
      }
      touch.state = 'online';
      touch.connection = status.connection;
      touch.boot = status.boot;
      touch.firmware = status.firmware;
      touch.lostConnection = undefined;
    },
    list: () => [...touches.values()],
  };
}

function emptyTouch(deviceId: string): DeviceTouch {
  return {
    deviceId,
    heardAt: 0,
    state: undefined,
    connection: undefined,
    boot: undefined,
    firmware: undefined,
    lostConnection: undefined,
    refused: 0,
  };
}
