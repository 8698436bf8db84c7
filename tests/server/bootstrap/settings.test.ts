import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readSettings } from '#server/bootstrap/settings.mjs';

describe('readSettings', () => {
  it('needs nothing', () => {
    expect(readSettings({})).toEqual({
      port: 4310,
      mqttPort: 4311,
      smtpPort: 4312,
      pgPort: 4313,
      mailPagePort: 4314,
      dataFolder: resolve('.data'),
      databaseUrl: undefined,
      shown: {
        PORT: '4310',
        MQTT_PORT: '4311',
        SMTP_PORT: '4312',
        PG_PORT: '4313',
        MAIL_PAGE_PORT: '4314',
        MILLRACE_DATA: resolve('.data'),
        MILLRACE_FLEET: '36',
      },
    });
  });

  it('takes what is given, and an empty variable as one that is not', () => {
    const settings = readSettings({
      PORT: '80',
      MILLRACE_FLEET: '0',
      MILLRACE_DATA: '/srv/x',
      SMTP_PORT: '',
      DATABASE_URL: '',
    });
    expect(settings).toMatchObject({ port: 80, smtpPort: 4312, dataFolder: '/srv/x', databaseUrl: undefined });
    expect(settings.shown.MILLRACE_FLEET).toBe('0');
  });

  it('names every fault at once', () => {
    const faulty = { PORT: 'web', MQTT_PORT: '70000', SMTP_PORT: '0', PG_PORT: '4314', MILLRACE_FLEET: '-3' };
    expect(() => readSettings(faulty)).toThrow(
      [
        'PORT is "web", it takes a whole number up to 65535',
        'MQTT_PORT is "70000", it takes a whole number up to 65535',
        'SMTP_PORT is 0, it takes a port from 1 to 65535',
        'MAIL_PAGE_PORT is 4314, which another of these ports has already',
        'MILLRACE_FLEET is "-3", it takes a whole number up to 100000',
      ].join('\n  '),
    );
  });
});
