import type { Detector } from '../detectors/detector.ts';
import type { Task } from './cautions.data.ts';

/** One thing to look at first, and why. */
export type Look = { readonly what: string; readonly why: string };

/** The English words of one alarm beside its title, which alarm-titles.data.ts holds. */
export type AlarmWording = {
  readonly meaning: string;
  readonly homeowner: string;
  readonly look: readonly Look[];
  readonly task: Task;
};

export type DetectorWording = AlarmWording & {
  /** What a known cause says instead. */
  readonly causes: Readonly<Record<string, Partial<AlarmWording>>>;
};

/** Common practice in the trade where no source is named. */
export const ALARM_WORDING: Readonly<Record<Detector, DetectorWording>> = {
  'wrong-speed': {
    meaning: 'The measured speed is off the one that the closed inputs and the program call for.',
    homeowner: 'Your pump is not running at the speed it was set up for. We have been told.',
    look: [
      {
        what: 'Speeds stored in the drive for each input and program entry',
        why: 'A changed setting looks just like this',
      },
      {
        what: 'Inputs at the motor’s terminals: which show closed on the drive’s display',
        why: 'Tells a wire from a setting',
      },
      {
        what: 'Drive display for a power or temperature limit',
        why: 'A drive that protects itself runs slower than asked',
      },
    ],
    task: 'look',
    causes: {
      'follows-lower-input': {
        meaning: 'Several inputs are closed and the motor obeys one with a lower speed. The highest should win.',
        look: [
          { what: 'Speeds stored for the closed inputs', why: 'They may have been entered the wrong way round' },
          { what: 'Leads at the input terminals', why: 'Two leads may have been swapped' },
        ],
        task: 'wiring',
      },
      'ignores-input': {
        meaning: 'A clock holds an input closed, and the motor does not follow it.',
        look: [
          {
            what: 'Whether the drive’s display shows the input closed',
            why: 'If not, the contact closes but the wire does not arrive',
          },
          { what: 'Input’s stored speed', why: 'An input without a speed never wins' },
          { what: 'Input lead and common at the terminals', why: 'A loose common drops every input' },
        ],
        task: 'wiring',
      },
      'runs-input-open': {
        meaning: 'No input is closed, yet the motor holds a speed that belongs to one.',
        look: [
          { what: 'Whether somebody chose that speed on the keypad', why: 'On manual looks the same' },
          { what: 'Input leads for a short behind the debounce', why: 'Damp in a junction box closes an input' },
        ],
        task: 'wiring',
      },
      derating: {
        meaning: 'The drive has lowered the speed to protect itself from heat.',
        look: [
          { what: 'Vents, leaves, sun on the motor', why: 'The drive cools by the air around it' },
          { what: 'Ambient and drive temperature on the display', why: 'Shows how far it is over' },
        ],
      },
      'power-limit': {
        meaning: 'The motor draws its largest power and cannot reach the speed asked for.',
        look: [
          {
            what: 'Valves: is the pump moving far more water than usual, perhaps to waste',
            why: 'More flow means more load',
          },
          { what: 'Supply voltage under load', why: 'A low supply lowers the power the drive can give' },
        ],
      },
      'unknown-speed': {},
    },
  },
  'input-disagreement': {
    meaning: 'The motor says that it obeys an input which cannot be the winner among the closed ones.',
    homeowner: 'A control wire at your pump may be on the wrong terminal. It still runs; we will look at it.',
    look: [
      {
        what: 'Input leads against the wiring record',
        why: 'Two leads may have been swapped at the motor or the device',
      },
      { what: 'Common lead of the inputs', why: 'Several clocks share it' },
    ],
    task: 'wiring',
    causes: {
      'swapped-leads': {},
    },
  },
  'missing-input': {
    meaning: 'The window that this input’s clock is known for has not opened.',
    homeowner: 'One of your time clocks did not switch when it usually does.',
    look: [
      {
        what: 'The clock: does its dial turn, is its time right, are the trippers tight',
        why: 'A stopped dial is the usual reason',
      },
      { what: 'Breaker that feeds the clock', why: 'The clock stands still without it' },
      { what: 'Contact at the fireman switch, then the lead to the motor', why: 'A worn switch or a broken wire' },
    ],
    task: 'wiring',
    causes: {
      'all-inputs': {
        meaning:
          'Every input that a clock should have closed stayed open: they share a supply, a breaker or a common lead.',
        look: [
          { what: 'Breaker that feeds the clocks', why: 'One breaker for all would explain it' },
          { what: 'Common lead at the motor', why: 'Open, it drops all inputs at once' },
        ],
      },
      'one-input': {},
    },
  },
  'stuck-input': {
    meaning: 'The contact should have opened at its off tripper and has not.',
    homeowner: 'One of your time clocks has not switched off when it usually does.',
    look: [
      { what: 'Off tripper on the dial', why: 'A lost or loose tripper never switches off' },
      { what: 'Lever of the clock', why: 'Somebody may have put it on by hand' },
      { what: 'Contact of the switch with the dial at off', why: 'A welded contact stays closed' },
    ],
    task: 'wiring',
    causes: {
      'tripper-missing': {},
      'switch-welded': {},
      'lever-left-on': {},
    },
  },
  'chattering-input': {
    meaning: 'The contact opens and closes many times within minutes. Each change restarts the motor’s decision.',
    homeowner: 'A switch at your pump is making poor contact. We will look at it.',
    look: [
      { what: 'Input lead and common at both ends', why: 'A loose wire chatters with vibration' },
      { what: 'Contact of the fireman switch', why: 'A worn one bounces' },
    ],
    task: 'wiring',
    causes: {
      'loose-wire': {},
      'switch-failing': {},
    },
  },
  'failed-prime': {
    meaning: 'The motor runs at speed but its watts say that the wet end is moving air. Run dry it ruins its seal.',
    homeowner: 'Your pump started but is not moving water. Please leave it alone: we have been told and will call you.',
    look: [
      {
        what: 'Lid and O-ring: seated, dry, no hiss',
        why: 'Air drawn in at the lid is the usual reason, most of all after it was opened',
      },
      { what: 'Water level at the skimmer', why: 'Low water lets the skimmer draw air' },
      { what: 'Suction valves, skimmer and pump baskets', why: 'A shut valve or a plugged basket starves the pump' },
      { what: 'Drain plugs and suction unions', why: 'A drip when stopped is air when running' },
    ],
    task: 'lid',
    causes: {
      'air-leak': {
        meaning: 'The watts stay at those of air from the first second: air comes in on the suction side.',
      },
      'water-low': {
        meaning: 'The pump catches water and loses it again: the water may stand too low at the skimmer.',
        look: [
          { what: 'Water level at the skimmer', why: 'Load comes and goes as the skimmer gulps air' },
          { what: 'Lid and O-ring: seated, dry, no hiss', why: 'The next most likely' },
          { what: 'Suction valves and baskets', why: 'To leave nothing out' },
        ],
      },
      blocked: { meaning: 'There is some load but far too little: the suction may be blocked.' },
      'valve-shut': { meaning: 'The watts are those of a shut valve: the pump churns the same water, which gets hot.' },
      'drained-back': { meaning: 'Each start takes longer: the water drains back while the pump stands.' },
    },
  },
  'slow-prime': {
    meaning: 'The last starts took at least twice the usual time to prime. It still primes.',
    homeowner: 'Your pump takes longer than it used to to fill with water when it starts.',
    look: [
      { what: 'Lid and O-ring, drain plugs, unions', why: 'A small air leak shows here first' },
      { what: 'Check valve, if there is one', why: 'A leaking one lets the water drain back' },
    ],
    task: 'lid',
    causes: {},
  },
  'loss-of-prime': {
    meaning: 'The speed holds but the load is gone: the wet end is moving air.',
    homeowner: 'Your pump is running but has stopped moving water. We have been told and will call you.',
    look: [
      { what: 'Water level at the skimmer', why: 'The usual reason for losing prime while running' },
      { what: 'Lid and O-ring, suction unions', why: 'Air drawn in' },
      { what: 'Suction valves and baskets', why: 'A valve moved or a basket plugged' },
    ],
    task: 'lid',
    causes: {
      sudden: {},
      ragged: {},
    },
  },
  'low-load': {
    meaning:
      'The pump does less work at the same speed: less water. The watts cannot tell a shut valve from a blocked suction.',
    homeowner: 'Less water than usual is moving. A basket or the filter may need cleaning.',
    look: [
      { what: 'Skimmer and pump baskets', why: 'A plugged basket is the first suspect' },
      {
        what: 'Filter pressure against its clean pressure at this speed',
        why: 'High: dirty filter or a valve shut after it. Low: blocked before it',
      },
      { what: 'Valve positions', why: 'A valve left part shut looks the same' },
      { what: 'Impeller for debris', why: 'Fine debris passes the basket' },
    ],
    task: 'lid',
    causes: {
      slow: {},
      sudden: {},
    },
  },
  'high-load': {
    meaning: 'The pump draws more than it did at the same speed.',
    homeowner: 'Your pump is working harder than usual at the same speed.',
    look: [
      { what: 'Valves: bypass open, or pumping to waste', why: 'More flow is more load' },
      { what: 'Noise and heat at the motor', why: 'Something may rub or a bearing may fail' },
    ],
    task: 'look',
    causes: {
      rubbing: { task: 'lid' },
      bypass: {},
      'to-waste': {
        meaning: 'The load is far above usual: the water may be going to waste. The pool loses water.',
      },
    },
  },
  stopped: {
    meaning: 'The inputs or the program call for a speed and the motor does not turn.',
    homeowner: 'Your pump is standing still when it should be running. We have been told.',
    look: [
      { what: 'Drive display: stop, fault or dark', why: 'It says which of the three it is' },
      { what: 'Breaker and ground-fault breaker', why: 'A trip has a reason: do not just reset it' },
    ],
    task: 'look',
    causes: {
      'keypad-stop': {
        meaning: 'Somebody stopped the pump at its keypad and it is still stopped.',
        homeowner: 'Your pump was stopped at its keypad and is still off.',
      },
      fault: {
        meaning: 'The drive reports a fault and holds the motor.',
        task: 'wiring',
      },
      unknown: {},
    },
  },
  'unexpected-run': {
    meaning: 'No input is closed and no program entry is due, yet the motor runs.',
    homeowner: 'Your pump is running outside its planned hours.',
    look: [
      { what: 'Program entries in the drive against the commissioned ones', why: 'The program may have been changed' },
      { what: 'Motor clock', why: 'A wrong clock runs the right program at the wrong time' },
    ],
    task: 'look',
    causes: {
      'program-changed': {},
      'motor-clock': {},
    },
  },
  'clock-shift': {
    meaning: 'The times at which this clock switches have moved against those it had.',
    homeowner: 'One of your time clocks shows the wrong time. We will set it at the next stop.',
    look: [
      { what: 'Dial against the time of day', why: 'Set it to the time now' },
      { what: 'Trippers', why: 'They may have been moved on purpose: ask first' },
    ],
    task: 'look',
    causes: {
      'power-cut': {},
      'daylight-saving': {
        meaning: 'The hour has changed and clocks were not set: what they switch is an hour off.',
        look: [{ what: 'Every clock on the pad: dial, timer, the drive’s own', why: 'One visit sets them all' }],
      },
      drift: {},
      'trippers-moved': {},
    },
  },
  'motor-clock': {
    meaning: 'The motor’s own clock is off, so its program runs at the wrong times.',
    homeowner: 'Your pump’s own clock shows the wrong time. We will set it at the next stop.',
    look: [{ what: 'Clock on the drive’s display', why: 'Set it; note whether it survives a power cut' }],
    task: 'look',
    causes: {
      'power-cut': {},
      'daylight-saving': {
        meaning: 'The hour has changed and clocks were not set: what they switch is an hour off.',
        look: [{ what: 'Every clock on the pad: dial, timer, the drive’s own', why: 'One visit sets them all' }],
      },
      drift: {},
    },
  },
  'fed-through-clock': {
    meaning:
      'The motor goes dark at the same time every day: its supply runs through a clock. It needs constant power.',
    homeowner:
      'Your pump loses its power at the same time every day. It needs constant power; we will look at the wiring.',
    look: [
      {
        what: 'Where the motor’s supply comes from: breaker or a clock’s line contacts',
        why: 'A drive needs constant power; only the low-voltage contact belongs to the clock',
      },
    ],
    task: 'wiring',
    causes: {},
  },
  'keypad-hold': {
    meaning: 'The motor has been run from its keypad for a long time. Its program waits.',
    homeowner: 'Your pump is running at a speed chosen on its keypad.',
    look: [{ what: 'Keypad: back to its program', why: 'Ask first whether somebody wants it so' }],
    task: 'look',
    causes: {},
  },
  'settings-changed': {
    meaning: 'What the motor says it is set to is not what was commissioned, and nobody of ours was on site.',
    homeowner: 'Settings of your pump were changed.',
    look: [
      {
        what: 'Reported settings beside the commissioned ones',
        why: 'Ask who changed them; then take them over or set them back',
      },
    ],
    task: 'look',
    causes: {},
  },
  'energized-without-flow': {
    meaning:
      'The clock that closes input {input} also feeds equipment without a flow switch of its own, and no water moves. It can overheat or gas off.',
    homeowner:
      'Equipment at your pool may be on without water moving. If you can do so safely, switch it off at its breaker and call us.',
    look: [
      { what: 'The equipment: is it on, is it hot. Switch it off at its breaker', why: 'A closed input is not flow' },
      { what: 'Why the pump does not move water', why: 'See the pump’s other readings' },
      { what: 'Interlock of the equipment', why: 'Heater, cell and feeder need their own flow switch' },
    ],
    task: 'lid',
    causes: {
      heater: {},
      cell: {},
      feeder: {},
    },
  },
  'too-little-water': {
    meaning: 'Over three days the pump moved less water than this pool, its heater or its cell needs.',
    homeowner: 'Your pump has been moving less water than your pool needs.',
    look: [
      { what: 'Program hours and clock windows', why: 'Short hours' },
      { what: 'Baskets and filter', why: 'Low flow' },
    ],
    task: 'look',
    causes: {
      'short-hours': {},
      'low-flow': {},
    },
  },
  freezing: {
    meaning: 'The air at the motor is at or near freezing and no water moves. Pipes, filter and heater can burst.',
    homeowner: 'It is freezing at your pump and no water is moving. We have been told.',
    look: [
      {
        what: 'Is there ice. If water has frozen, do not start the pump',
        why: 'Ice breaks the impeller and the housing',
      },
      { what: 'Why it stands: stop, fault, no freeze protection set', why: 'See the source on the drive’s display' },
    ],
    task: 'look',
    causes: {},
  },
  'supply-voltage': {
    meaning: 'The voltage at the motor is more than ten per cent off its nominal.',
    homeowner: 'The electrical supply at your pump is out of range.',
    look: [
      {
        what: 'Voltage at the panel and at the motor, under load',
        why: 'Equal: call the utility. Lower at the motor: a bad connection, for an electrician',
      },
    ],
    task: 'wiring',
    causes: {
      sag: {},
      standing: {},
    },
  },
  'drive-fault': {
    meaning: 'The drive reports a fault of its own.',
    homeowner: 'Your pump’s drive reports a fault. We have been told.',
    look: [
      { what: 'Fault code on the display, against the maker’s manual', why: 'It names the part' },
      { what: 'Breaker, ground-fault breaker, supply voltage', why: 'Do not just reset a trip' },
    ],
    task: 'wiring',
    causes: {},
  },
  'drive-hot': {
    meaning: 'The drive’s temperature is over its model’s limit. It will slow the motor down to save itself.',
    homeowner: 'Your pump’s electronics are running hot.',
    look: [{ what: 'Vents, leaves, sun, enclosure', why: 'The drive cools by the air around it' }],
    task: 'look',
    causes: {},
  },
  silent: {
    meaning: 'The device has not been heard. The pump may run as always: we cannot see it.',
    homeowner: 'We cannot see your pump at the moment. It may be running as always.',
    look: [
      { what: 'Device’s lamp and its power', why: 'Dark: no power. Lit: no link' },
      { what: 'Router at the house', why: 'A new password or a moved router' },
    ],
    task: 'look',
    causes: {
      power: {
        meaning: 'Neighbours went quiet at the same time: the power may be out there.',
        homeowner: 'Pumps near yours went quiet at the same time: the power may be out in your area.',
        look: [
          {
            what: 'Power company’s word on an outage there',
            why: 'Nothing at the pads needs a visit before it is back',
          },
          {
            what: 'Time clocks, once the power is back',
            why: 'A dial stands still in an outage and is slow by its length from then on',
          },
        ],
      },
      'own-link': {
        meaning: 'Devices of many areas dropped within two minutes: look at our end first. The pumps run as always.',
        homeowner: 'Our own connection is down. Your pump runs as always; we will see it again soon.',
        look: [
          {
            what: 'This server’s network and the port devices connect to',
            why: 'One cable or rule cuts off all of them',
          },
          { what: 'The mobile network or provider that the devices share', why: 'An outage there looks the same' },
        ],
      },
      link: {},
      device: {},
    },
  },
  'clock-skew': {
    meaning: 'Readings arrive with times well behind their arrival: the device’s clock is wrong.',
    homeowner: 'The clock of our device at your pump is wrong. Your pump is not affected.',
    look: [
      { what: 'Device: restart it, check that it reaches its time server', why: 'It sets its clock from the network' },
    ],
    task: 'look',
    causes: {},
  },
  'costly-program': {
    meaning: 'Another program meets every need of the pad and would have cost at least a quarter less for two weeks.',
    homeowner: 'Your pump could do the same work for less. We will suggest a new program.',
    look: [
      { what: 'Proposed program beside the one it has', why: 'Advice only: a person decides' },
      {
        what: 'Turnovers, heater, cell and quiet hours recorded for the pad',
        why: 'The proposal is as good as what is recorded',
      },
      { what: 'Customer: ask before a program is changed', why: 'Somebody may want those hours or that flow' },
    ],
    task: 'look',
    causes: {
      'dear-hours': {
        meaning:
          'It runs in hours in which energy is dear. At other hours the same work costs at least a quarter less.',
      },
      'hours-too-long': {
        meaning:
          'It moves far more water than the pad’s turnovers ask for. A program that meets every need costs at least a quarter less.',
      },
      'speed-too-high': {
        meaning:
          'It runs faster than the pad needs: power goes with the cube of speed. Slower for longer costs at least a quarter less.',
      },
    },
  },
};
