import { resolve } from 'node:path';

/** What the simulated fleet reads from its environment. */
export type SimulatorEnvironment = {
  /** MQTT_PORT: where the broker listens on loopback; 4311. */
  readonly mqttPort: number;
  /** MILLRACE_FLEET: how many pumps to simulate, the first of the demo company's; 36, 0 for none. */
  readonly pumps: number;
  /** MILLRACE_DATA: the folder with the device secrets and the mark of the seeded history; .data. */
  readonly dataFolder: string;
};

/** Reads the environment once; every fault comes back in one list. */
export function readSimulatorEnvironment(
  source: Readonly<Record<string, string | undefined>> = process.env,
): SimulatorEnvironment | { readonly faults: readonly string[] } {
  const faults: string[] = [];
  const whole = (name: string, usual: number, low: number, high: number): number => {
    const text = source[name];
    if (text === undefined || text === '') return usual;
    const value = Number(text);
    if (Number.isInteger(value) && value >= low && value <= high) return value;
    faults.push(`${name} is ${JSON.stringify(text)}; it must be a whole number from ${low} to ${high}.`);
    return usual;
  };
  const mqttPort = whole('MQTT_PORT', 4311, 1, 65_535);
  const pumps = whole('MILLRACE_FLEET', 36, 0, 100_000);
  const dataFolder = resolve(source.MILLRACE_DATA || '.data');
  return faults.length > 0 ? { faults } : { mqttPort, pumps, dataFolder };
}
