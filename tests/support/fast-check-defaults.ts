import { configureGlobal } from 'fast-check';

/** A property says how many runs it needs when these are too few; a failing seed is printed either way. */
configureGlobal({ numRuns: 100, interruptAfterTimeLimit: 10_000, markInterruptAsFailure: false });
