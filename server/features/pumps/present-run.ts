import type { Run } from '#shared/contract/http/runs.ts';
import type { RunRow } from './run-read-model.ts';

export const presentRun = ({ pumpId: _pumpId, ...run }: RunRow): Run => run;
