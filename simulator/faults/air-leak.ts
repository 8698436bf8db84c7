import { definePrimeFault } from './define-prime-fault.ts';

export const airLeak = definePrimeFault({
  slug: 'air-leak',
  cause: 'air-leak',
  story: 'The lid went back on with its seal out of the groove: the pump draws air.',
  trouble: ({ conditions, chance }, wrong) => {
    conditions.suction.airLeak = wrong ? chance.between(0.85, 1) : 0;
  },
});
