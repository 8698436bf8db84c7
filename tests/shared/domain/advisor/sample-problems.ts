import fc from 'fast-check';
import type { EntryProblem, SlotChoices } from '#shared/domain/advisor/entry-problem.ts';

const WIDTH = 3;
const amount = fc.integer({ min: 1, max: 60 });

/** A slot of three choices: off, slow, fast; now and then one is forbidden, now and then one costs nothing. */
const slot: fc.Arbitrary<SlotChoices> = fc
  .record({
    price: fc.integer({ min: 0, max: 9 }),
    forbidden: fc.option(fc.integer({ min: 0, max: WIDTH - 1 }), { freq: 5 }),
    startCost: fc.integer({ min: 0, max: 30 }),
    startLoss: fc.integer({ min: 0, max: 4 }),
    counted: fc.integer({ min: 1, max: WIDTH }),
  })
  .map(({ price, forbidden, startCost, startLoss, counted }) => ({
    cost: [0, 3 * price, 10 * price].map((cost, choice) => (choice === forbidden ? Number.POSITIVE_INFINITY : cost)),
    gallons: [0, 10, 20],
    counts: [0, 1, 2].map((choice) => (choice >= counted ? 1 : 0)),
    startCost: [0, startCost, startCost],
    startLoss: [0, startLoss, startLoss],
  }));

/** Days short enough to try every program. */
export const smallProblems: fc.Arbitrary<EntryProblem> = fc.record({
  slots: fc.array(slot, { minLength: 1, maxLength: 6 }),
  wantedGallons: amount,
  wantedCount: fc.oneof(fc.constant(0), fc.integer({ min: 0, max: 3 })),
  entryLimit: fc.integer({ min: 0, max: 3 }),
  cyclic: fc.boolean(),
});
