import { describe, expect, it } from 'vitest';
import { decodeNotice, encodeNotice } from '#shared/contract/mqtt/notice.ts';

describe('notice', () => {
  it('reads back what it wrote', () => {
    expect(decodeNotice(encodeNotice({ bad: 3, reason: 'w-negative' }))).toEqual({ bad: 3, reason: 'w-negative' });
  });

  it.each(['', '{}', '{"bad":0,"reason":"x"}', '{"bad":1.5,"reason":"x"}', '{"bad":1,"reason":""}'])(
    'does not read %j',
    (text) => {
      expect(decodeNotice(text)).toBeUndefined();
    },
  );
});
