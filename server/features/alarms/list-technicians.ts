import type { Context } from '#server/context.ts';
import type { Technicians } from '#shared/contract/http/alarm-acts.ts';
import { listTechnicianRows } from './technicians-read-model.ts';

/** Whom an alarm may be given to. */
export const listTechnicians = async (context: Context): Promise<Technicians> => ({
  items: await listTechnicianRows(context),
});
