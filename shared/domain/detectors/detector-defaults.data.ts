/**
 * Delays, thresholds and off-delays of every rule, as they stand before a company, a motor model or a pump overrides
 * them. Units are in the names. `offDelaySeconds` is the on-delay up to ten minutes and a deadband is a quarter of its
 * threshold, unless the line says why not. Figures without a source are common practice in the trade.
 */
export const DETECTOR_DEFAULTS = {
  'fed-through-clock': { sameTimeMinutes: 10, days: 2, shortestOutageMinutes: 20, offDelaySeconds: 0 },
  silent: { delaySeconds: 3600, offDelaySeconds: 600, soonAfterHours: 72, frostCelsius: 0 },
  'drive-fault': {
    delaySeconds: 0,
    // A drive that trips and tries again would return every few minutes: it has to stay clear for ten.
    offDelaySeconds: 600,
    urgentStoppedSeconds: 600,
    urgentFaults: 3,
    urgentWithinHours: 24,
  },
  freezing: {
    delaySeconds: 1800,
    offDelaySeconds: 600,
    urgentCelsius: 0,
    unprotectedCelsius: 4.4,
    // The device's sensor is not the motor's: the guard counts as missed only this far below it.
    sensorToleranceCelsius: 1,
    deadbandCelsius: 1.1,
  },
  'energized-without-flow': { delaySeconds: 180, offDelaySeconds: 180 },
  stopped: {
    delaySeconds: 1200,
    offDelaySeconds: 600,
    keypadStopSeconds: 7200,
    urgentAfterSeconds: 21_600,
    frostCelsius: 0,
  },
  'unexpected-run': {
    delaySeconds: 3600,
    offDelaySeconds: 600,
    // A pump that never says what commands it may be on manual or on a timed run, which nobody can see.
    withoutSourceSeconds: 14_400,
    sameClockMinutes: 15,
  },
  'failed-prime': {
    delaySeconds: 0,
    offDelaySeconds: 180,
    pastPrimeSeconds: 180,
    tries: 2,
    // A try counts once it lasted its prime time, within these.
    shortestTrySeconds: 20,
    longestTrySeconds: 120,
  },
  'loss-of-prime': {
    delaySeconds: 180,
    offDelaySeconds: 180,
    fastRpm: 2400,
    slowRpm: 1500,
    slowDelaySeconds: 600,
    slowOffDelaySeconds: 600,
    raggedShare: 0.12,
    raggedTimesUsual: 4,
  },
  'low-load': {
    delaySeconds: 1800,
    offDelaySeconds: 600,
    deadbandShare: 0.25,
    // Of the watts, at once; of the flow, by the median of three days.
    suddenShare: 0.2,
    noteShare: 0.3,
    alarmShare: 0.4,
    // Where the flow cannot be told, of the watts: they fall by about half as much.
    noteWattsShare: 0.15,
    alarmWattsShare: 0.2,
  },
  'high-load': {
    delaySeconds: 7200,
    offDelaySeconds: 600,
    deadbandShare: 0.25,
    aboveShare: 0.15,
    farAboveShare: 0.3,
    farAboveSeconds: 1200,
  },
  'too-little-water': {
    days: 3,
    coverageShare: 0.9,
    // The flow is known to some per cent: what misses the target by less may well meet it.
    shortShare: 0.93,
    shortMinutes: 60,
    shortDays: 2,
    offDelaySeconds: 0,
  },
  'motor-clock': { offMinutes: 15, clockSeconds: 3600, edges: 3, deadbandMinutes: 3.75, offDelaySeconds: 600 },
  'clock-shift': {
    shiftMinutes: 15,
    edges: 3,
    edgesAfterCut: 2,
    sameAsCutMinutes: 10,
    shortestCutMinutes: 15,
    deadbandMinutes: 3.75,
    offDelaySeconds: 0,
  },
  'missing-input': { lateMinutes: 60, graceMinutes: 5, dueDays: 2, dueDaysThatMatter: 1, offDelaySeconds: 600 },
  'input-disagreement': { delaySeconds: 60, offDelaySeconds: 60 },
  'settings-changed': { delaySeconds: 0, offDelaySeconds: 0 },
  'wrong-speed': {
    delaySeconds: 180,
    offDelaySeconds: 180,
    deadbandShare: 0.25,
    programEdgeMinutes: 10,
    withoutSourceSeconds: 14_400,
    hotMarginCelsius: 5,
    powerLimitShare: 0.9,
    limitOverUsual: 1.08,
    overloadShare: 1.3,
    lowVoltsShare: 0.9,
  },
  'stuck-input': {
    noteAfterMinutes: 180,
    alarmAfterMinutes: 1560,
    // A lever put on by hand at another hour: a party lasts longer than three hours.
    byHandMinutes: 300,
    offDelaySeconds: 600,
  },
  'chattering-input': {
    transitions: 6,
    withinSeconds: 300,
    bounceSeconds: 2,
    edgeSeconds: 30,
    quietSeconds: 300,
    days: 3,
    // A burst in which the sixth transition came; so many within the hours are a wire, fewer on several days a switch.
    wireBursts: 3,
    wireWithinSeconds: 10_800,
    // Contacts chatter in bursts, a worn switch once or twice a day: one alarm until a whole day was quiet.
    offDelaySeconds: 93_600,
  },
  'slow-prime': {
    timesUsual: 2,
    starts: 5,
    ofStarts: 6,
    teachingStarts: 10,
    leastExcessSeconds: 30,
    offDelaySeconds: 0,
  },
  'keypad-hold': { delaySeconds: 43_200, afterCallSeconds: 1800, offDelaySeconds: 600 },
  'supply-voltage': {
    meanMinutes: 10,
    offShare: 0.1,
    deadbandShare: 0.025,
    sagShare: 0.85,
    sagSeconds: 30,
    learningDays: 3,
    offDelaySeconds: 600,
  },
  'drive-hot': {
    delaySeconds: 600,
    offDelaySeconds: 600,
    // A quarter of a temperature in °C means nothing: five degrees is the usual step of a drive's own fan.
    deadbandCelsius: 5,
    deratedHours: 2,
    deratedDays: 3,
  },
  'clock-skew': { messages: 3, behindSeconds: 120, deadbandSeconds: 30, offDelaySeconds: 0 },
} as const;

export type DetectorDefaults = typeof DETECTOR_DEFAULTS;
/** The detectors that the fold judges. */
export type FoldedDetector = keyof DetectorDefaults;
