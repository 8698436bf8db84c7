import { describe, expect, it } from 'vitest';
import { createLogger } from '#server/log/logger.ts';

const logged = (write: (log: ReturnType<typeof createLogger>) => void): Record<string, unknown> => {
  const lines: string[] = [];
  write(createLogger('node', 'info', { write: (text) => void lines.push(text) }));
  return JSON.parse(lines[0] ?? '{}');
};

describe('the log', () => {
  it('is one JSON object a line, with the program and the time', () => {
    expect(logged((log) => log.info({ requestId: 'r1' }, 'request'))).toMatchObject({
      program: 'node',
      requestId: 'r1',
      msg: 'request',
      time: expect.stringMatching(/^\d{4}-\d\d-\d\dT[\d:.]+Z$/),
    });
  });

  it('leaves out secrets, wherever they turn up', () => {
    const secrets = {
      password: 'p',
      user: { token: 't' },
      request: { headers: { cookie: 'c', authorization: 'a' } },
      secret: 's',
    };
    const line = logged((log) => log.info(secrets, 'oops'));
    expect(line).toMatchObject({
      password: '[left out]',
      user: { token: '[left out]' },
      request: { headers: { cookie: '[left out]', authorization: '[left out]' } },
      secret: '[left out]',
    });
  });

  it('keeps to its level', () => {
    expect(logged((log) => log.debug('detail'))).toEqual({});
  });
});
