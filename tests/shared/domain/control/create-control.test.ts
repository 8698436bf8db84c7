import { describe, expect, it } from 'vitest';
import type { ControlAnswer } from '#shared/domain/control/control-answer.ts';
import { type Control, createControl } from '#shared/domain/control/create-control.ts';
import { isNearProgramEdge } from '#shared/domain/control/is-near-program-edge.ts';
import type { Reading } from '#shared/domain/readings/reading.ts';
import { entry, type Invented, inventedPump, reading, wall } from './invented-pump.ts';

const PHOENIX = 'America/Phoenix';
const day = (text: string): number => wall(PHOENIX, `2025-07-01 ${text}`);

/** Feeds a reading every ten seconds from one instant to another. */
function steady(control: Control, from: number, to: number, rpm: number, more: Partial<Reading> = {}): ControlAnswer {
  let answer = control.push(reading(from, rpm, more));
  for (let at = from + 10_000; at <= to; at += 10_000) answer = control.push(reading(at, rpm, more));
  return answer;
}

/** A pump that stood through the minute before an instant. */
function stoodUntil(at: number, given: Invented = {}): Control {
  const control = createControl(inventedPump(given));
  steady(control, at - 60_000, at - 10_000, 0);
  return control;
}

describe('prime', () => {
  it('begins with the program’s edge, lasts its seconds, and gives way to the program', () => {
    const control = stoodUntil(day('06:00'));
    const started = control.push(reading(day('06:00:04'), 3450));
    expect(started.due).toMatchObject({ source: 'prime', rpm: 3450, because: { next: 'program' } });
    expect(started.primeEndsAt).toBe(day('06:05'));
    expect(started.sinceStartSeconds).toBe(4);
    expect(steady(control, day('06:00:10'), day('06:04:50'), 3450).due.source).toBe('prime');
    expect(steady(control, day('06:05'), day('06:05'), 3450).due).toMatchObject({ source: 'program', rpm: 1700 });
  });

  it('is due from the edge on also while the shaft stands, and then no more', () => {
    const control = stoodUntil(day('06:00'));
    expect(steady(control, day('06:00'), day('06:04:50'), 0).due.source).toBe('prime');
    expect(steady(control, day('06:05'), day('06:30'), 0).due.source).toBe('program');
  });

  it('starts again in full after an interruption', () => {
    const control = stoodUntil(day('06:00'));
    steady(control, day('06:00'), day('06:03'), 3450);
    steady(control, day('06:03:10'), day('06:03:30'), 0);
    const again = control.push(reading(day('06:03:40'), 3450));
    expect(again.primeEndsAt).toBe(day('06:08:40'));
    expect(steady(control, day('06:03:50'), day('06:08:30'), 3450).due.source).toBe('prime');
    expect(control.push(reading(day('06:08:40'), 1700)).due.source).toBe('program');
  });

  it('does not start anew when one running source hands over to another, and goes on under the new one', () => {
    const control = stoodUntil(day('06:00'));
    steady(control, day('06:00'), day('06:02'), 3450);
    const taken = steady(control, day('06:02:10'), day('06:04:50'), 3450, { closedInputs: 1 });
    expect(taken.due).toMatchObject({ source: 'prime', lockedBy: 1, because: { next: 'input' } });
    expect(taken.primeEndsAt).toBe(day('06:05'));
    const later = steady(control, day('06:05'), day('07:00'), 2850, { closedInputs: 1 });
    expect(later.due).toMatchObject({ source: 'input', rpm: 2850 });
    expect(steady(control, day('07:00:10'), day('07:00:20'), 2850).due).toMatchObject({ source: 'program', rpm: 1700 });
  });

  it('follows a start by a closed input at night', () => {
    const control = stoodUntil(day('22:00'));
    const closed = control.push(reading(day('22:00'), 0, { closedInputs: 2 }));
    expect(closed.due.source).toBe('prime');
    const turning = control.push(reading(day('22:00:02'), 900, { closedInputs: 2 }));
    expect(turning.primeEndsAt).toBe(day('22:05'));
    const over = steady(control, day('22:00:10'), day('22:05'), 3450, { closedInputs: 2 });
    expect(over.due).toMatchObject({ source: 'input', rpm: 2400 });
  });

  it('counts as running when the motor started before its time, so that only the rest of it is due', () => {
    const control = stoodUntil(day('05:58'));
    expect(steady(control, day('05:58'), day('05:59:50'), 3450).due.source).toBe('off');
    expect(steady(control, day('06:00'), day('06:02:50'), 3450).due.source).toBe('prime');
    expect(steady(control, day('06:03'), day('06:03'), 1700).due.source).toBe('program');
  });

  it('is believed for 30 s beyond its time while the motor says that it primes, and not a second longer', () => {
    const control = stoodUntil(day('06:00'));
    const primes: Partial<Reading> = { reportedSource: 'prime' };
    expect(steady(control, day('06:00'), day('06:05:20'), 3450, primes).due.source).toBe('prime');
    expect(steady(control, day('06:05:30'), day('06:05:30'), 3450, primes).due.source).toBe('program');
  });

  it('is believed also where nothing that the server can see asked for it', () => {
    const control = stoodUntil(day('22:00'));
    const answer = control.push(reading(day('22:00'), 3450, { reportedSource: 'prime' }));
    expect(answer.due).toMatchObject({ source: 'prime', because: { next: 'off' } });
  });

  it('is taken for granted after a gap only while the shaft turns at its speed', () => {
    const unseen = createControl(inventedPump());
    expect(unseen.push(reading(day('10:00'), 3450)).due.source).toBe('prime');
    expect(unseen.answer()?.sinceStartSeconds).toBeUndefined();
    expect(steady(unseen, day('10:00:10'), day('10:01'), 1700).due.source).toBe('program');
    const running = createControl(inventedPump());
    expect(running.push(reading(day('10:00'), 1700)).due.source).toBe('program');
    expect(steady(running, day('10:00:10'), day('10:00:30'), 3450).due.source).toBe('program');
    const forEver = createControl(inventedPump());
    expect(steady(forEver, day('10:00'), day('10:05:30'), 3450).due.source).toBe('program');
  });

  it('is none where it is switched off', () => {
    const control = stoodUntil(day('06:00'), { settings: { prime: null } });
    expect(control.push(reading(day('06:00'), 1700)).due).toMatchObject({ source: 'program', rpm: 1700 });
    expect(control.answer()?.primeEndsAt).toBeUndefined();
  });
});

describe('what a motor says', () => {
  const running = (given: Invented = {}): Control => {
    const control = createControl(inventedPump(given));
    steady(control, day('11:50'), day('11:59:50'), 1700);
    return control;
  };

  it('is believed of the keypad: the expected speed is the measured one', () => {
    const control = running();
    const onManual = steady(control, day('12:00'), day('12:10'), 1234, { reportedSource: 'keypad' });
    expect(onManual.due).toMatchObject({ source: 'keypad', rpm: 1234 });
    const faster = steady(control, day('12:10:10'), day('12:20'), 2600, { reportedSource: 'keypad' });
    expect(faster.due.rpm).toBe(2600);
    expect(faster.offExpected).toBe(false);
  });

  it.each(['keypad', 'timed'] as const)('is not believed of %s while a closed input wins', (reportedSource) => {
    const answer = steady(running(), day('12:00'), day('12:10'), 1234, { reportedSource, closedInputs: 1 });
    expect(answer.due).toMatchObject({ source: 'input', rpm: 2850 });
    const nullInput = steady(running(), day('12:00'), day('12:10'), 3200, { reportedSource, closedInputs: 0b100 });
    expect(nullInput.due.source).toBe(reportedSource);
  });

  it('is believed of a timed run for its minutes', () => {
    const control = running();
    const timed: Partial<Reading> = { reportedSource: 'timed' };
    expect(steady(control, day('12:00'), day('12:44:50'), 3200, timed).due).toMatchObject({
      source: 'timed',
      rpm: 3200,
    });
    expect(steady(control, day('12:45'), day('12:45'), 3200, timed).due.source).toBe('program');
    expect(running({ settings: { timed: null } }).push(reading(day('12:00'), 3200, timed)).due.source).toBe('program');
  });

  it('lets an interrupted timed run go on for the rest of its minutes where the model resumes it', () => {
    const until = (timedResumes: boolean): number | undefined => {
      const control = running({ traits: { timedResumes } });
      steady(control, day('12:00'), day('12:10'), 3200, { reportedSource: 'timed' });
      steady(control, day('12:10:10'), day('12:20'), 2850, { reportedSource: 'input', closedInputs: 1 });
      return steady(control, day('12:20:10'), day('12:21'), 3200, { reportedSource: 'timed' }).due.until;
    };
    expect(until(true)).toBe(day('12:55'));
    expect(until(false)).toBe(day('13:05:10'));
  });

  it('is believed of a keypad stop, while what would be due without it stays known', () => {
    const answer = steady(running(), day('12:00'), day('12:10'), 0, { reportedSource: 'stop' });
    expect(answer.decision).toMatchObject({ source: 'stop', rpm: 0 });
    expect(answer.due).toMatchObject({ source: 'program', rpm: 1700 });
    expect(answer.offExpected).toBe(true);
    const control = running({ traits: { stopBeatsInputs: false } });
    const closed = steady(control, day('12:00'), day('12:10'), 0, { reportedSource: 'stop', closedInputs: 1 });
    expect(closed.decision.source).toBe('input');
  });

  it('is believed of a fault, by its source or by a code while the shaft stands', () => {
    const said = steady(running(), day('12:00'), day('12:01'), 0, { reportedSource: 'fault', fault: 'E7' });
    expect(said.decision).toMatchObject({ source: 'fault', because: { code: 'E7' } });
    expect(steady(running(), day('12:00'), day('12:01'), 0, { fault: 'E7' }).decision.source).toBe('fault');
    expect(steady(running(), day('12:00'), day('12:01'), 1700, { fault: 'W2' }).decision.source).toBe('program');
  });

  it.each(['input', 'program', 'off'] as const)('is not believed of %s, which is computed', (reportedSource) => {
    expect(steady(running(), day('12:00'), day('12:10'), 0, { reportedSource }).due).toMatchObject({
      source: 'program',
      rpm: 1700,
    });
  });

  it('is missed where it says nothing: without it a speed held at the keypad is off what is expected', () => {
    const answer = steady(running(), day('12:00'), day('12:10'), 1234);
    expect(answer.due.source).toBe('program');
    expect(answer.offExpected).toBe(true);
  });
});

describe('freeze protection', () => {
  const night = (): Control => stoodUntil(day('01:00'), { settings: { prime: null } });

  it('starts at its limit, runs an hour, and is then checked again', () => {
    const control = night();
    expect(control.push(reading(day('01:00'), 0, { ambientCelsius: 4.5 })).due.source).toBe('off');
    expect(control.push(reading(day('01:00:10'), 0, { ambientCelsius: 4.4 })).due).toMatchObject({
      source: 'freeze',
      rpm: 1150,
    });
    expect(steady(control, day('01:00:20'), day('02:00'), 1150, { ambientCelsius: 6 }).due.source).toBe('freeze');
    expect(steady(control, day('02:00:10'), day('02:00:10'), 1150, { ambientCelsius: 6 }).due.source).toBe('off');
  });

  it('goes on for another hour where it is still cold', () => {
    const control = night();
    steady(control, day('01:00'), day('02:00'), 1150, { ambientCelsius: 3 });
    expect(steady(control, day('02:00:10'), day('02:59'), 1150, { ambientCelsius: 6 }).due.source).toBe('freeze');
  });

  it('has had its own check where the motor already stands in warmer air', () => {
    const control = night();
    steady(control, day('01:00'), day('01:30'), 1150, { ambientCelsius: 4 });
    expect(steady(control, day('01:30:10'), day('01:30:20'), 0, { ambientCelsius: 5 }).due.source).toBe('off');
  });

  it('is believed of a motor that says so, and gives way to the program', () => {
    const control = night();
    const says: Partial<Reading> = { reportedSource: 'freeze' };
    expect(steady(control, day('05:30'), day('05:59:50'), 1150, says).due.source).toBe('freeze');
    expect(steady(control, day('06:00'), day('06:00'), 1150, says).due.source).toBe('program');
  });

  it('never runs where it is switched off', () => {
    const control = stoodUntil(day('01:00'), { settings: { freeze: null } });
    expect(
      steady(control, day('01:00'), day('01:10'), 0, { ambientCelsius: -5, reportedSource: 'freeze' }).due.source,
    ).toBe('off');
  });
});

describe('the motor’s own clock', () => {
  it('is taken from what it shows, and moves the program', () => {
    const control = createControl(inventedPump());
    const shown = (text: string, motorClockMinute: number) =>
      control.push(reading(day(text), 0, { motorClockMinute })).due.source;
    expect(shown('05:00', 270)).toBe('off');
    expect(control.answer()).toMatchObject({ motorClockOffsetMinutes: -30, motorClockKnown: true });
    expect(steady(control, day('05:00:10'), day('06:29:50'), 0).due.source).toBe('off');
    expect(steady(control, day('06:30'), day('06:30'), 3450).due.source).toBe('prime');
  });

  it('stays where it is while the minute shown can be its own', () => {
    const control = createControl(inventedPump());
    for (let at = day('05:00'); at < day('05:20'); at += 7000) {
      control.push(reading(at, 0, { motorClockMinute: Math.floor((at - day('00:00')) / 60_000) }));
      expect(control.answer()?.motorClockOffsetMinutes).toBe(0);
    }
  });

  it('is moved by two readings that agree, not by one that errs', () => {
    const control = createControl(inventedPump());
    const offsetAfter = (text: string, motorClockMinute: number) =>
      control.push(reading(day(text), 0, { motorClockMinute })).motorClockOffsetMinutes;
    expect(offsetAfter('05:00', 300)).toBe(0);
    expect(offsetAfter('05:01', 700)).toBe(0);
    expect(offsetAfter('05:02', 302)).toBe(0);
    expect(offsetAfter('05:03', 363)).toBe(0);
    expect(offsetAfter('05:04', 364)).toBe(60);
  });

  it('falls behind at once when the wall clock goes forward and it does not', () => {
    const control = createControl(inventedPump({ zone: 'America/New_York' }));
    const shift = wall('America/New_York', '2025-03-09 03:00');
    control.push(reading(shift - 10_000, 0, { motorClockMinute: 119 }));
    expect(control.push(reading(shift, 0, { motorClockMinute: 120 })).motorClockOffsetMinutes).toBe(-60);
  });

  it('is taken as learnt from outside where the motor shows none', () => {
    const control = createControl(inventedPump());
    control.push(reading(day('05:00'), 0));
    expect(control.answer()).toMatchObject({ motorClockKnown: false, motorClockOffsetMinutes: 0 });
    control.setMotorClockOffset(120);
    expect(control.push(reading(day('05:00:10'), 0)).due.source).not.toBe('off');
    expect(control.answer()).toMatchObject({ motorClockKnown: true, motorClockOffsetMinutes: 120 });
    control.push(reading(day('05:00:20'), 0, { motorClockMinute: 300 }));
    control.push(reading(day('05:00:30'), 0, { motorClockMinute: 300 }));
    expect(control.answer()?.motorClockOffsetMinutes).toBe(0);
    control.setMotorClockOffset(undefined);
    expect(control.answer()?.motorClockKnown).toBe(true);
  });

  it('tells how near a program edge is', () => {
    const control = createControl(
      inventedPump({ settings: { program: [entry('06:00', '12:00', 1700), entry('12:00', '20:00', 1700)] } }),
    );
    const near = (text: string): boolean => {
      return isNearProgramEdge(control.push(reading(day(text), 1700)), 10);
    };
    const nears = ['05:49', '05:51', '06:09', '06:11', '12:00', '19:51', '20:10', '20:11'].map(near);
    expect(nears).toEqual([false, true, true, false, false, true, true, false]);
  });
});

describe('the ramp', () => {
  it('is over once the speed moved under 20 rpm between two readings after the change', () => {
    const control = createControl(inventedPump());
    steady(control, day('11:50'), day('11:59:50'), 1700);
    expect(control.answer()?.rampOver).toBe(true);
    const over = [1700, 2000, 2500, 2840, 2850].map((rpm, second) => {
      return control.push(reading(day('12:00') + second * 1000, rpm, { closedInputs: 1 })).rampOver;
    });
    expect(over).toEqual([false, false, false, false, true]);
  });

  it('is over after 30 s in any case', () => {
    const control = createControl(inventedPump());
    steady(control, day('11:50'), day('11:59:50'), 1700);
    const over = [0, 10, 20, 29, 30].map((second) => {
      return control.push(reading(day('12:00') + second * 1000, 1700 + second * 30, { closedInputs: 1 })).rampOver;
    });
    expect(over).toEqual([false, false, false, false, true]);
  });
});

describe('a reading', () => {
  it('that is not after the last changes nothing', () => {
    const control = stoodUntil(day('06:00'));
    const before = JSON.stringify(control.save());
    expect(control.push(reading(day('05:59:50'), 3450, { closedInputs: 3 })).at).toBe(day('05:59:50'));
    expect(JSON.stringify(control.save())).toBe(before);
  });

  it('that is no number changes nothing', () => {
    const control = stoodUntil(day('06:00'));
    const before = JSON.stringify(control.save());
    control.push(reading(day('06:00'), Number.NaN));
    control.push(reading(Number.NaN, 0));
    expect(JSON.stringify(control.save())).toBe(before);
  });
});
