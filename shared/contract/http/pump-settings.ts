import { z } from 'zod';
import {
  EQUIPMENT_KINDS,
  INPUT_DUTIES,
  INPUT_KINDS,
  INTERLOCKS,
  PAD_STATES,
} from '#shared/domain/control/pump-context.ts';
import { SOURCES } from '#shared/domain/readings/reading.ts';

const Rpm = z.number().min(0).max(4000);
const Days = z.array(z.boolean()).length(7);

export const PadStateName = z.enum(PAD_STATES);

/** Commissioned settings of a motor: the domain's MotorSettings, field for field. */
export const MotorSettingsShape = z.object({
  inputs: z.array(Rpm.nullable()).max(8),
  program: z
    .array(
      z.object({
        days: Days,
        fromMinute: z.number().int().min(0).max(1439),
        toMinute: z.number().int().min(1).max(1440),
        rpm: Rpm,
      }),
    )
    .max(32),
  prime: z.object({ rpm: Rpm, seconds: z.number().int().min(1).max(3600) }).nullable(),
  timed: z.object({ rpm: Rpm, minutes: z.number().int().min(1).max(1440) }).nullable(),
  freeze: z.object({ celsius: z.number().min(-10).max(20), rpm: Rpm }).nullable(),
  maxRpm: Rpm,
  minRpm: Rpm,
});

export const MotorTraitsShape = z.object({
  inputCount: z.number().int().min(0).max(8),
  precedence: z.array(z.enum(SOURCES)),
  programOverlap: z.enum(['first-listed', 'higher-speed']),
  stopBeatsInputs: z.boolean(),
  timedResumes: z.boolean(),
  driveHotCelsius: z.number(),
});

export const WiredInputShape = z.object({
  number: z.number().int().min(1).max(8),
  kind: z.enum(INPUT_KINDS),
  windows: z
    .array(
      z.object({
        days: Days,
        onMinute: z.number().int().min(0).max(1439),
        offMinute: z.number().int().min(0).max(1440),
        opensEarlyMinutes: z.number().min(0).max(120),
      }),
    )
    .max(16),
  drives: z.enum(INPUT_DUTIES).optional(),
  circuit: z.enum(['motor', 'own']).optional(),
  clockType: z.enum(['synchronous', 'spring-carry-over', 'battery-carry-over', 'electronic']).optional(),
});

export const EquipmentShape = z.object({
  kind: z.enum(EQUIPMENT_KINDS),
  input: z.number().int().min(1).max(8).optional(),
  minimumGpm: z.number().min(0).max(500).optional(),
  interlock: z.enum(INTERLOCKS),
});
