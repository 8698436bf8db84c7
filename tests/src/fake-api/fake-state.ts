import type { WebSocket } from 'ws';
import { LARKMOOR } from '#shared/contract/demo/larkmoor.data.ts';
import type { ErrorCode } from '#shared/contract/errors.ts';
import type { Preferences, Session } from '#shared/contract/http/session.ts';
import type { Role } from '#shared/contract/primitives.ts';
import type { ServerFrame } from '#shared/contract/socket/frames.ts';
import { createFakeFleet, type FakePump } from './fake-fleet.ts';
import { fakeId } from './fake-id.ts';
import { createFakeTariffs, type FakeTariffs } from './fake-tariffs.ts';

/** Everything a test may turn: who is signed in, what fails, how slow answers are, what the fleet does. */
export type FakeState = {
  readonly now: () => number;
  pumps: FakePump[];
  role: Role | undefined;
  preferences: Preferences;
  /** Answers of these paths are refused with a code; `hang` never answers. */
  failures: Map<string, ErrorCode | 'hang'>;
  retryAfterSeconds: number;
  /** Whether anybody has said what a kWh costs. */
  energy: { money: boolean };
  tariffs: FakeTariffs;
  /** Every call that came, as `METHOD path?query`. */
  readonly calls: string[];
  readonly sockets: Set<WebSocket>;
  cursor: number;
};

/** A Tuesday evening at the pads: 1 December 2026, 7:30 PM in Los Angeles. */
export const FAKE_EVENING = Date.UTC(2026, 11, 2, 3, 30);

export function createFakeState(options: { role?: Role; size?: number; at?: number } = {}): FakeState {
  const at = options.at ?? FAKE_EVENING;
  const started = Date.now();
  return {
    now: () => at + (Date.now() - started),
    pumps: createFakeFleet(at, options.size),
    role: options.role,
    preferences: { units: 'us', theme: 'system', clock: 'locale' },
    failures: new Map(),
    retryAfterSeconds: 30,
    energy: { money: true },
    tariffs: createFakeTariffs(at),
    calls: [],
    sockets: new Set(),
    cursor: 100,
  };
}

export function sessionOf(state: FakeState, role: Role): Session {
  const person = LARKMOOR.people.find((each) => each.role === role);
  if (person === undefined) throw new Error(`nobody is a ${role}`);
  return {
    user: {
      id: fakeId('user', LARKMOOR.people.indexOf(person)),
      name: person.name,
      initials: person.name
        .split(' ')
        .map((word) => word.slice(0, 1))
        .join(''),
      email: person.email,
      role,
    },
    company: { id: fakeId('company', 1), name: LARKMOOR.name, zone: LARKMOOR.zone, phone: '+1 555 555 0100' },
    preferences: state.preferences,
    accessUntil: state.now() + 900_000,
    serverNow: state.now(),
  };
}

/** The pumps the person signed in may see. */
export function visiblePumps(state: FakeState): FakePump[] {
  if (state.role !== 'homeowner') return state.pumps;
  const customer = LARKMOOR.people.find(({ role }) => role === 'homeowner')?.customer;
  return state.pumps
    .filter((pump) => pump.customer === customer)
    .map((pump) => ({ ...pump, detail: { ...pump.detail, customerName: null } }));
}

/** Sends a frame to every open page. */
export function broadcast(state: FakeState, frame: ServerFrame): void {
  for (const socket of state.sockets) socket.send(JSON.stringify(frame));
}
