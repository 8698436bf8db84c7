import { encodeReadingFields } from '#shared/contract/mqtt/encode-reading.ts';
import { encodeSettings } from '#shared/contract/mqtt/settings.ts';
import { encodeStatus } from '#shared/contract/mqtt/status.ts';
import type { Arrival } from './device/in-process-device.ts';

/** Writes one arrival as lines of a readings file, each with its line feed. Readings of one message share their `at`. */
export function encodeArrival(arrival: Arrival): string {
  const { serial, at } = arrival;
  switch (arrival.kind) {
    case 'readings': {
      let lines = '';
      for (const reading of arrival.readings) {
        const late = reading.at === at ? '' : `,"at":${at}`;
        lines += `{"s":"${serial}",${encodeReadingFields(reading)}${late}}\n`;
      }
      return lines;
    }
    case 'status':
      return `{"s":"${serial}","at":${at},"status":${encodeStatus(arrival.status)}}\n`;
    case 'settings':
      return `{"s":"${serial}","at":${at},"settings":${encodeSettings(arrival.settings)}}\n`;
    case 'on-site':
      return `{"s":"${serial}","at":${at},"onSite":${arrival.on}}\n`;
  }
}
