import { definePrimeFault } from './define-prime-fault.ts';

export const valveShut = definePrimeFault({
  slug: 'valve-shut',
  cause: 'valve-shut',
  story: 'A valve was left shut after the filter was cleaned: the pump is full and moves nothing.',
  trouble: ({ conditions }, wrong) => {
    conditions.valve = wrong ? 1e6 : 1;
  },
});
