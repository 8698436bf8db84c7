import type { DeviceStatus } from '#shared/domain/fold/pump-event.ts';

/** What one batch changes of a device's own row. */
export type DeviceTouch = {
  readonly deviceId: string;
  /** Undefined when all that came was a will, which is no word of the device. */
  heardAt: number | undefined;
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
  /** A word of the device itself: whatever it says, it is there. */
  readonly hear: (deviceId: string, at: number) => DeviceTouch;
  readonly takeStatus: (deviceId: string, at: number, status: DeviceStatus) => void;
  readonly list: () => DeviceTouch[];
};

/** No device touched yet. */
export function createDeviceTouches(): DeviceTouches {
  const touches = new Map<string, DeviceTouch>();
  const touchOf = (deviceId: string): DeviceTouch => {
    const touch = touches.get(deviceId) ?? emptyTouch(deviceId);
    touches.set(deviceId, touch);
    return touch;
  };
  const hear = (deviceId: string, at: number): DeviceTouch => {
    const touch = touchOf(deviceId);
    touch.heardAt = Math.max(touch.heardAt ?? at, at);
    touch.state = 'online';
    touch.lostConnection = undefined;
    return touch;
  };
  return {
    hear,
    takeStatus: (deviceId, at, status) => {
      if (status.state === 'lost') {
        const touch = touchOf(deviceId);
        // A take-over publishes the will of the old connection late: it must not call the new one lost.
        if (touch.connection === undefined || touch.connection === status.connection) {
          touch.lostConnection = status.connection;
        }
        return;
      }
      const touch = hear(deviceId, at);
      touch.connection = status.connection;
      touch.boot = status.boot;
      touch.firmware = status.firmware;
    },
    list: () => [...touches.values()],
  };
}

function emptyTouch(deviceId: string): DeviceTouch {
  return {
    deviceId,
    heardAt: undefined,
    state: undefined,
    connection: undefined,
    boot: undefined,
    firmware: undefined,
    lostConnection: undefined,
    refused: 0,
  };
}
