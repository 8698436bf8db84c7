import { type BenchChild, startChild } from './child-process.ts';
import type { ConnectOrder, LoadReport, RunOrder } from './load-generator.ts';

/** Devices in a process of their own. */
export type Load = {
  readonly run: (order: RunOrder['run']) => Promise<LoadReport>;
  readonly stop: () => Promise<void>;
};

const CONNECT_WITHIN_MS = 120_000;

/** Connects devices; they stay until `stop`. */
export async function startLoad(order: ConnectOrder['connect']): Promise<Load> {
  const child: BenchChild = startChild('load-generator.ts');
  child.send({ connect: order });
  await child.next('connected', CONNECT_WITHIN_MS);
  return {
    run: async (what) => {
      child.send({ run: what });
      return child.next<LoadReport>('report', (what.seconds + 60) * 1000);
    },
    stop: child.stop,
  };
}
