import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { findConnectFault } from '#server/broker/connect-rules.ts';
import { topicsOfDevice } from '#server/broker/topic-rules.ts';

const shard = (createHash('sha256').update('MR-000123').digest()[0]! & 0x3f).toString(16).padStart(2, '0');
const GOOD = {
  clientId: 'MR-000123',
  username: 'MR-000123',
  keepAliveSeconds: 60,
  willTopic: `millrace/v1/${shard}/MR-000123/status`,
};

describe('the rules of a CONNECT', () => {
  it('pass a device that keeps them, with and without a will', () => {
    expect(findConnectFault(GOOD)).toBeUndefined();
    expect(findConnectFault({ ...GOOD, willTopic: undefined })).toBeUndefined();
  });

  it.each([
    ['client-id-no-serial', { clientId: 'mr-000123', username: 'mr-000123' }],
    ['client-id-no-serial', { clientId: '', username: '' }],
    ['username-not-the-serial', { username: 'MR-000124' }],
    ['username-not-the-serial', { username: undefined }],
    ['keep-alive', { keepAliveSeconds: 0 }],
    ['keep-alive', { keepAliveSeconds: 59 }],
    ['keep-alive', { keepAliveSeconds: 301 }],
    ['will-topic', { willTopic: `millrace/v1/${shard}/MR-000124/status` }],
    ['will-topic', { willTopic: `millrace/v1/${shard}/MR-000123/readings` }],
  ])('name %s', (fault, change) => {
    expect(findConnectFault({ ...GOOD, ...change })).toBe(fault);
  });
});

describe("a device's topics", () => {
  const topics = topicsOfDevice('MR-000123');

  it('are its own, in its own shard', () => {
    for (const kind of ['readings', 'status', 'settings']) {
      expect(topics.kindOf(`millrace/v1/${shard}/MR-000123/${kind}`)).toBe(kind);
    }
    expect(topics.notice).toBe(`millrace/v1/${shard}/MR-000123/notice`);
  });

  it.each([
    `millrace/v1/${shard}/MR-000123/notice`,
    `millrace/v1/${shard}/MR-000124/readings`,
    `millrace/v1/${shard === '00' ? '01' : '00'}/MR-000123/readings`,
    `millrace/v1/${shard}/MR-000123/readings/`,
    `millrace/v2/${shard}/MR-000123/readings`,
    '$SYS/broker',
  ])('do not hold %s', (topic) => {
    expect(topics.kindOf(topic)).toBeUndefined();
  });
});
