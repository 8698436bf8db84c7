import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { buildTopic, isSerial, parseTopic, shardFromDigestByte, TOPIC_KINDS } from '#shared/contract/mqtt/topics.ts';

describe('topics', () => {
  it.each(TOPIC_KINDS)('reads back the %s topic it wrote', (kind) => {
    const digest = createHash('sha256').update('MR-000123').digest();
    const topic = { shard: shardFromDigestByte(digest[0] ?? 0), serial: 'MR-000123', kind };

    expect(parseTopic(buildTopic(topic))).toEqual(topic);
  });

  it('writes the shard as two lower-case hex digits', () => {
    expect(buildTopic({ shard: 10, serial: 'MR-000123', kind: 'readings' })).toBe('millrace/v1/0a/MR-000123/readings');
  });

  it('keeps the low six bits of the digest byte', () => {
    expect(shardFromDigestByte(0xff)).toBe(63);
    expect(shardFromDigestByte(0x40)).toBe(0);
  });

  it.each([
    'millrace/v1/0A/MR-000123/readings',
    'millrace/v1/40/MR-000123/readings',
    'millrace/v1/+/MR-000123/readings',
    'millrace/v1/0a/MR-000123/#',
    'millrace/v1/0a/mr-000123/readings',
    'millrace/v1/0a/MR-000123/readings/',
    'millrace/v2/0a/MR-000123/readings',
    '$SYS/broker',
  ])('does not read %s', (topic) => {
    expect(parseTopic(topic)).toBeUndefined();
  });

  it.each([
    ['MR-000', true],
    ['MR-00', false],
    ['-MR-000123', false],
    [`M${'0'.repeat(31)}`, true],
    [`M${'0'.repeat(32)}`, false],
    ['MR_000123', false],
    ['MR-000123\n', false],
  ])('judges the serial %j as %s', (serial, expected) => {
    expect(isSerial(serial)).toBe(expected);
  });
});
