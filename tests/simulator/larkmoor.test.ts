import { describe, expect, it } from 'vitest';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import { isSerial } from '#shared/contract/mqtt/topics.ts';
import { checkMotorSettings } from '#shared/domain/control/check-motor-settings.ts';
import { listLarkmoorPumps } from '#simulator/larkmoor.ts';
import { dutyGpm } from '#simulator/physics/duty-point.ts';
import { findSystemK, printCurve } from '#simulator/score/pad-file.ts';
import { programGallons } from '#simulator/score/standing-truth.ts';

const pumps = listLarkmoorPumps();
const demoPumps = LARKMOOR.pads.flatMap((pad) => pad.pumps.map((pump) => ({ pad, pump })));
const CLEAN = { valve: 1, dirt: 1.3, staticFeet: 0 };

describe('Larkmoor Pool Care', () => {
  it('has 36 pumps on 30 pads, on three routes, and one pad in another zone', () => {
    expect([LARKMOOR.pads.length, pumps.length]).toEqual([30, 36]);
    expect(new Set(LARKMOOR.pads.map(({ area }) => area))).toEqual(new Set(LARKMOOR.routes.map(({ area }) => area)));
    expect(LARKMOOR.pads.filter(({ zone }) => zone !== LARKMOOR.zone).map(({ name }) => name)).toEqual([
      'Weir House',
      'Sagebrush Loop 204',
    ]);
  });

  it('has motors with three, four and five inputs, and serials of its own for each', () => {
    expect(LARKMOOR.motorModels.map(({ traits }) => traits.inputCount)).toEqual([3, 4, 5]);
    expect(new Set(pumps.map(({ serial }) => serial)).size).toBe(36);
    expect(pumps.every(({ serial }) => isSerial(serial))).toBe(true);
    expect(new Set(demoPumps.map(({ pump }) => pump.motorSerial)).size).toBe(36);
  });

  it('has somebody for everything it names', () => {
    const customers = new Set(LARKMOOR.customers.map(({ key }) => key));
    const technicians = LARKMOOR.people.filter(({ role }) => role === 'technician').map(({ email }) => email);

    expect(LARKMOOR.pads.filter(({ customer }) => !customers.has(customer))).toEqual([]);
    expect(LARKMOOR.routes.map(({ technician }) => technician).every((email) => technicians.includes(email))).toBe(
      true,
    );
    expect(LARKMOOR.pads.find(({ name }) => name === 'Tern Court 4')?.area).toBe('North');
    expect(LARKMOOR.people.find(({ role }) => role === 'homeowner')?.customer).toBe(
      LARKMOOR.pads.find(({ name }) => name === 'Saltern Way 12')?.customer,
    );
  });

  it('commissions settings that a motor can have', () => {
    for (const { pump } of demoPumps) {
      const model = LARKMOOR.motorModels.find(({ name }) => name === pump.motorModel);
      if (model === undefined) throw new Error(`no model ${pump.motorModel}`);
      expect(pump.settings.inputs).toHaveLength(model.traits.inputCount);
      expect(checkMotorSettings(pump.settings, model.traits)).toEqual([]);
      for (const { number } of pump.inputs) expect(pump.settings.inputs[number - 1]).toBeGreaterThan(0);
      for (const { input } of pump.equipment)
        if (input !== undefined) expect(pump.inputs.some(({ number }) => number === input)).toBe(true);
    }
  });

  it('prints curves and system curves that its own physics gives, rounded as a maker and a technician do', () => {
    for (const [index, { pump }] of demoPumps.entries()) {
      const spec = pumps[index];
      if (spec === undefined) throw new Error('a pump is missing');
      expect(pump.systemK).toBeCloseTo(findSystemK(spec), 4);
    }
    for (const model of LARKMOOR.wetEndModels) {
      const spec = pumps.find(
        (_, index) => demoPumps[index]?.pump.wetEndModel === model.name && demoPumps[index]?.pump.purpose !== 'booster',
      );
      const printed = spec === undefined ? [] : printCurve(spec);
      expect(printed.map(({ gpm, ft }) => ({ gpm, ft }))).toEqual(
        model.points.map(({ gpm, feet }) => ({ gpm, ft: feet })),
      );
    }
  });

  it('gives every heater and cell the water it needs at its input’s speed', () => {
    for (const spec of pumps) {
      for (const { input, minimumGpm } of spec.equipment) {
        const speeds =
          input === undefined ? spec.settings.program.map(({ rpm }) => rpm) : [spec.settings.inputs[input - 1] ?? 0];
        for (const rpm of speeds)
          expect(dutyGpm(spec.wetEnd, spec.system, CLEAN, rpm)).toBeGreaterThan(minimumGpm ?? 0);
      }
    }
  });

  it('turns every pool over once a day by program, all but the one whose hours are too short', () => {
    const short = pumps.filter(
      (spec) => spec.paper.poolGallons !== undefined && programGallons(spec) < spec.paper.poolGallons,
    );

    expect(short.map(({ padName }) => padName)).toEqual(['Lantern Hill 3']);
  });
});
