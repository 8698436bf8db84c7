import { definePrimeFault } from './define-prime-fault.ts';

export const waterLow = definePrimeFault({
  slug: 'water-low',
  cause: 'water-low',
  story: 'The pool is below the skimmer: the pump gulps air and surges.',
  trouble: ({ conditions }, wrong) => {
    conditions.suction.waterLow = wrong;
  },
});
