import type { PumpSlot } from './pump-slot.ts';

/** The pumps that this process folds. */
export type SlotTable = {
  readonly set: (slot: PumpSlot) => void;
  readonly delete: (pumpId: string) => void;
  readonly find: (pumpId: string) => PumpSlot | undefined;
  readonly findByNumber: (pumpNumber: number) => PumpSlot | undefined;
  readonly list: () => PumpSlot[];
  readonly size: () => number;
};

/** No pump yet. */
export function createSlotTable(): SlotTable {
  const byId = new Map<string, PumpSlot>();
  const byNumber = new Map<number, PumpSlot>();
  return {
    set: (slot) => {
      byId.set(slot.pump.pumpId, slot);
      byNumber.set(slot.pump.pumpNumber, slot);
    },
    delete: (pumpId) => {
      const slot = byId.get(pumpId);
      byId.delete(pumpId);
      if (slot !== undefined) byNumber.delete(slot.pump.pumpNumber);
    },
    find: (pumpId) => byId.get(pumpId),
    findByNumber: (pumpNumber) => byNumber.get(pumpNumber),
    list: () => [...byId.values()],
    size: () => byId.size,
  };
}
