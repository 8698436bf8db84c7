import type { Alarm } from '#shared/contract/http/alarms.ts';

/** The notes of one pad, in the order in which they came. */
export type PadNotes = { readonly pad: Alarm; readonly notes: readonly Alarm[] };

/** Notes by pad; pads in the order in which they first come. What speaks for several pads stands alone. */
export function groupByPad(notes: readonly Alarm[]): PadNotes[] {
  const pads = new Map<string, Alarm[]>();
  for (const note of notes) {
    const key = note.padId ?? note.id;
    pads.set(key, [...(pads.get(key) ?? []), note]);
  }
  return [...pads.values()].flatMap((group) => {
    const [pad] = group;
    return pad === undefined ? [] : [{ pad, notes: group }];
  });
}
