import type { Detector } from '../detectors/detector.ts';

/**
 * The titles of one detector's alarms: the first whose `{places}` the evidence can fill is taken, a known cause's own
 * before the detector's. A place is `{name}` for a number or word, `{name:duration}` for minutes, `{name:temperature}`
 * for degrees Celsius, `{name:percent}` for a share of 1, `{name#pad|pads}` for a count with its noun. They stand apart from the other words because a fleet's
 * wall needs them and nothing else.
 */
export type DetectorTitles = {
  readonly titles: readonly string[];
  readonly causes: Readonly<Record<string, readonly string[]>>;
};

export const ALARM_TITLES: Readonly<Record<Detector, DetectorTitles>> = {
  'wrong-speed': {
    titles: ['Runs {measuredRpm} rpm, {expectedRpm} expected', 'Not at its expected speed'],
    causes: {
      'follows-lower-input': [
        'Follows input {followedInput} though input {input} is closed',
        'Follows the lower of two closed inputs',
      ],
      'ignores-input': ['Input {input} closed, runs program speed', 'A closed input is ignored'],
      'runs-input-open': [
        'Runs input {followedInput}’s speed with all inputs open',
        'Runs an input’s speed with all inputs open',
      ],
      derating: ['Runs {measuredRpm} rpm, {expectedRpm} expected: hot drive', 'Slowed down by a hot drive'],
      'power-limit': [
        'Runs {measuredRpm} rpm, {expectedRpm} expected: at its power limit',
        'Held back at the drive’s power limit',
      ],
      'unknown-speed': ['Runs {measuredRpm} rpm, which no setting explains', 'Runs a speed that no setting explains'],
    },
  },
  'input-disagreement': {
    titles: [
      'Obeys input {activeInput}, but input {input} is closed',
      'The motor’s input does not match the closed contact',
    ],
    causes: { 'swapped-leads': ['Inputs {input} and {activeInput} look swapped', 'Two input leads look swapped'] },
  },
  'missing-input': {
    titles: ['Input {input} did not close when its clock should', 'An input did not close when it should'],
    causes: { 'all-inputs': ['None of the inputs closes any more'] },
  },
  'stuck-input': {
    titles: ['Input {input} closed {minutes:duration} past its off time', 'An input stays closed past its off time'],
    causes: {
      'tripper-missing': ['Input {input} never opens: off tripper missing?', 'An off tripper looks missing'],
      'switch-welded': ['Input {input} never opens: welded contact?', 'A switch looks welded'],
      'lever-left-on': ['Input {input} left on by hand?', 'A clock’s lever looks left on'],
    },
  },
  'chattering-input': {
    titles: ['Input {input} opens and closes again and again', 'An input chatters'],
    causes: {
      'loose-wire': ['Input {input} chatters: loose wire?', 'An input chatters: loose wire?'],
      'switch-failing': ['Input {input} chatters: worn switch?', 'An input chatters: worn switch?'],
    },
  },
  'failed-prime': { titles: ['Did not prime, {tries#try|tries}', 'Did not prime'], causes: {} },
  'slow-prime': {
    titles: ['Takes {usualRatio} times its usual time to prime', 'Takes longer and longer to prime'],
    causes: {},
  },
  'loss-of-prime': {
    titles: ['Lost its prime at {rpm} rpm', 'Lost its prime while running'],
    causes: {
      sudden: ['Lost its prime all at once at {rpm} rpm', 'Lost its prime all at once'],
      ragged: ['Draws air: ragged load at {rpm} rpm', 'Draws air: the load is ragged'],
    },
  },
  'low-load': {
    titles: ['Load down {drop:percent} at the same speed', 'Less load than usual at this speed'],
    causes: {
      slow: ['Flow down {drop:percent}, dirty filter?', 'Less flow week by week, dirty filter?'],
      sudden: [
        'Load fell at once on {pads#pad|pads} in {area}: baskets?',
        'Load down {drop:percent} all at once, basket?',
        'Load fell all at once, basket?',
      ],
    },
  },
  'high-load': {
    titles: ['Load up {rise:percent} at the same speed', 'More load than usual at this speed'],
    causes: {
      rubbing: ['Load up {rise:percent}: something may rub', 'Load up: something may rub'],
      bypass: ['Load up {rise:percent}: a bypass may be open', 'Load up: a bypass may be open'],
      'to-waste': ['Perhaps pumping to waste', 'Perhaps pumping to waste'],
    },
  },
  stopped: {
    titles: ['Stands still, {expectedRpm} rpm due', 'Stands still though a speed is due'],
    causes: {
      'keypad-stop': ['Stopped at the keypad', 'Stopped at the keypad'],
      fault: ['Stopped by fault {fault}', 'Stopped by a drive fault'],
    },
  },
  'unexpected-run': {
    titles: ['Runs {measuredRpm} rpm with nothing due', 'Runs though nothing is due'],
    causes: {
      'program-changed': ['Runs a program we did not set', 'Runs a program we did not set'],
      'motor-clock': ['Runs its program at the wrong time', 'Runs its program at the wrong time'],
    },
  },
  'clock-shift': {
    titles: ['Time clock {input} is {minutes:duration} {direction}', 'A time clock is off'],
    causes: {
      'power-cut': [
        'Time clock {input} is {minutes:duration} slow since a power cut',
        'A time clock stood still in a power cut',
      ],
      'daylight-saving': [
        '{pads#pad still has|pads still have} last season’s time',
        'Time clock {input} still has last season’s time',
        'A time clock still has last season’s time',
      ],
      drift: ['Time clock {input} drifts, now {minutes:duration} {direction}', 'A time clock drifts'],
      'trippers-moved': ['Time clock {input}: trippers moved', 'A time clock’s trippers were moved'],
    },
  },
  'motor-clock': {
    titles: ['Motor clock {minutes:duration} {direction}', 'The motor’s own clock is off'],
    causes: {
      'power-cut': [
        'Motor clock {minutes:duration} {direction} since a power cut',
        'The motor’s clock lost time in a power cut',
      ],
      'daylight-saving': [
        '{pads#pad still has|pads still have} last season’s time',
        'Motor clock still has last season’s time',
      ],
      drift: ['Motor clock drifts, now {minutes:duration} {direction}', 'The motor’s clock drifts'],
    },
  },
  'fed-through-clock': {
    titles: ['Loses power at the same time every day', 'Loses power at the same time every day'],
    causes: {},
  },
  'keypad-hold': { titles: ['On manual for {minutes:duration}', 'Left on manual'], causes: {} },
  'settings-changed': {
    titles: [
      '{changes#setting differs|settings differ} from the commissioned ones',
      'Settings differ from the commissioned ones',
    ],
    causes: {},
  },
  'energized-without-flow': {
    titles: ['{equipment} may be energized without flow', 'Equipment may be energized without flow'],
    causes: {
      heater: ['Heater may fire without flow', 'Heater may fire without flow'],
      cell: ['Chlorine cell may run without flow', 'Chlorine cell may run without flow'],
      feeder: ['Feeder may dose without flow', 'Feeder may dose without flow'],
    },
  },
  'too-little-water': {
    titles: ['Turns over {turnovers#time|times} a day, {target} wanted', 'Moves too little water for this pool'],
    causes: {
      'short-hours': ['Runs too few hours: {turnovers} of {target} turnovers', 'Runs too few hours for this pool'],
      'low-flow': ['Flow too low: {turnovers} of {target} turnovers', 'Flow too low for this pool'],
    },
  },
  freezing: { titles: ['{ambientCelsius:temperature} and standing still', 'Freezing and standing still'], causes: {} },
  'supply-voltage': {
    titles: ['Supply {volts} V, {nominalVolts} V nominal', 'Supply voltage out of range'],
    causes: {
      sag: ['Supply sagged to {volts} V', 'The supply sags'],
      standing: ['Supply stands at {volts} V, {nominalVolts} V nominal', 'Supply voltage out of range'],
    },
  },
  'drive-fault': { titles: ['Drive fault {fault}', 'The drive reports a fault'], causes: {} },
  'drive-hot': {
    titles: ['Drive at {driveCelsius:temperature}, limit {limitCelsius:temperature}', 'The drive runs hot'],
    causes: {},
  },
  silent: {
    titles: ['No word for {minutes:duration}', 'No word from the device'],
    causes: {
      power: [
        '{pads#pad|pads} in {area} went quiet together',
        'No word: the power may be out there',
        'No word: the power may be out',
      ],
      'own-link': ['{pumps#device|devices} dropped at once: our own link', 'No word: our own link is down'],
      link: ['No word for {minutes:duration}: its link is down', 'No word: its link is down'],
      device: ['No word for {minutes:duration}: the device itself?', 'No word: the device itself?'],
    },
  },
  'clock-skew': { titles: ['Device clock {skewMinutes:duration} behind', 'The device’s clock is behind'], causes: {} },
  'costly-program': {
    titles: ['Another program costs {saving:percent} less', 'The program could cost less'],
    causes: {
      'dear-hours': ['Runs in dear hours: {saving:percent} to save'],
      'hours-too-long': ['More water than asked for: {saving:percent} to save'],
      'speed-too-high': ['Runs faster than it must: {saving:percent} to save'],
    },
  },
};
