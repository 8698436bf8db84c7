import { definePrimeFault } from './define-prime-fault.ts';

export const drainedBack = definePrimeFault({
  slug: 'drained-back',
  cause: 'drained-back',
  story: 'The check valve does not hold: the line drains back, and every start has the whole lift to draw.',
  trouble: ({ conditions }, wrong) => {
    conditions.suction.drainsBack = wrong;
  },
});
