import type { Notice } from '#shared/contract/mqtt/notice.ts';
import { NOTICE_INTERVAL_MS } from '#shared/contract/mqtt/wire-limits.ts';

/** Counts refusals a device and says when it is time to tell the device: at most once a minute. */
export type NoticeBook = (serial: string, count: number, reason: string, at: number) => Notice | undefined;

/** No device refused yet. */
export function createNoticeBook(): NoticeBook {
  const pages = new Map<string, { noticedAt: number; bad: number }>();
  return (serial, count, reason, at) => {
    const page = pages.get(serial) ?? { noticedAt: Number.NEGATIVE_INFINITY, bad: 0 };
    pages.set(serial, page);
    page.bad += count;
    if (at - page.noticedAt < NOTICE_INTERVAL_MS) return undefined;
    const notice = { bad: page.bad, reason };
    page.noticedAt = at;
    page.bad = 0;
    return notice;
  };
}
