import { definePrimeFault } from './define-prime-fault.ts';

export const blockedSuction = definePrimeFault({
  slug: 'blocked-suction',
  cause: 'blocked',
  story: 'Leaves plug the suction line: the pump churns what little it has.',
  trouble: ({ conditions }, wrong) => {
    conditions.suction.blocked = wrong;
  },
});
