import { definePrimeFault } from './define-prime-fault.ts';

export const airLeakAtRestart = definePrimeFault({
  slug: 'air-leak-at-restart',
  cause: 'air-leak',
  story: 'The basket was cleaned with the breaker off; it goes on again with the lid’s seal out of the groove.',
  stoppedBy: 'breaker',
  trouble: ({ conditions, chance }, wrong) => {
    conditions.suction.airLeak = wrong ? chance.between(0.85, 1) : 0;
  },
});
