import { describe, expect, it } from 'vitest';
import { readSimulatorEnvironment } from '#simulator/env.ts';

describe('readSimulatorEnvironment', () => {
  it('works on a clean machine', () => {
    expect(readSimulatorEnvironment({})).toMatchObject({
      mqttPort: 4311,
      pumps: 36,
      dataFolder: expect.stringMatching(/\.data$/),
    });
  });

  it('takes what it is given', () => {
    const source = { MQTT_PORT: '5000', MILLRACE_FLEET: '5', MILLRACE_DATA: '/tmp/demo' };

    expect(readSimulatorEnvironment(source)).toEqual({ mqttPort: 5000, pumps: 5, dataFolder: '/tmp/demo' });
  });

  it('lists every fault at once', () => {
    const result = readSimulatorEnvironment({ MQTT_PORT: 'mqtt', MILLRACE_FLEET: '-1' });

    expect('faults' in result && result.faults.map((fault) => fault.split(' ')[0])).toEqual([
      'MQTT_PORT',
      'MILLRACE_FLEET',
    ]);
  });
});
