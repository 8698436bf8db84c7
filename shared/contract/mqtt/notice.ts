import { isJsonObject, parseJsonText, shortText } from './json-text.ts';

/** What the server tells a device whose readings it refuses: how many since the last notice, and why the last. */
export type Notice = { readonly bad: number; readonly reason: string };

/** Writes a notice. */
export function encodeNotice(notice: Notice): string {
  return JSON.stringify({ bad: notice.bad, reason: notice.reason });
}

/** Reads a notice; undefined when it is none. */
export function decodeNotice(text: string): Notice | undefined {
  const value = parseJsonText(text);
  if (!isJsonObject(value)) return undefined;
  const reason = shortText(value.reason, 200);
  const bad = value.bad;
  if (reason === undefined || typeof bad !== 'number' || !Number.isInteger(bad) || bad < 1) return undefined;
  return { bad, reason };
}
