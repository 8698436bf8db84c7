import { listClosedInputs } from '#shared/domain/control/winning-input.ts';
import { clockDifference } from '#shared/domain/time/clock-time.ts';
import { defineDetector, type Finding } from '../define-detector.ts';
import type { RuleParameters } from '../detector-parameters.ts';
import type { Facts } from '../facts.ts';
import { INPUT_COUNT, perInput } from '../inputs/input-facts.ts';
import { ABNORMAL, type Judgement, NORMAL } from '../judgement.ts';

/**
 * By input: its last transition, the edge that began the present unrest, the last counted transitions, and all of
 * them. `days` are local days on which an edge bounced as often; `burstAt` is the last time the rule was met.
 */
type State = {
  last: number[];
  edge: number[];
  counted: number[][];
  all: number[][];
  days: number[][];
  burstAt: number;
  from: number;
  input: number;
  several: boolean;
  atEdges: boolean;
  /** When the last bursts began, and on which local days. */
  bursts: number[];
  burstDays: number[];
};
type Parameters = RuleParameters<'chattering-input'>;

const NEAR_TRIPPER_MINUTES = 10;
const NEW_BURST_MS = 120_000;

function judge(state: State, facts: Facts, parameters: Parameters): Judgement {
  const edges = facts.inputs.closedEdges | facts.inputs.openedEdges;
  if (edges !== 0) {
    for (let index = 0; index < INPUT_COUNT; index += 1) {
      if ((edges & (1 << index)) !== 0) takeTransition(state, index, facts, parameters);
    }
  }
  if (state.burstAt === 0) return NORMAL;
  return facts.now - state.burstAt <= parameters.withinSeconds * 1000 ? ABNORMAL : NORMAL;
}

function takeTransition(state: State, index: number, facts: Facts, parameters: Parameters): void {
  const { now } = facts;
  const sinceLast = now - (state.last[index] ?? 0);
  state.last[index] = now;
  if (sinceLast <= parameters.bounceSeconds * 1000) return;
  const isEdge = sinceLast >= parameters.quietSeconds * 1000;
  if (isEdge) state.edge[index] = now;
  const withinMs = parameters.withinSeconds * 1000;
  const recent = (list: readonly number[] | undefined): number[] => [
    ...(list ?? []).filter((at) => now - at <= withinMs),
    now,
  ];
  const all = recent(state.all[index]).slice(-parameters.transitions);
  state.all[index] = all;
  if (isEdge || now - (state.edge[index] ?? 0) > parameters.edgeSeconds * 1000) {
    const counted = recent(state.counted[index]).slice(-parameters.transitions);
    state.counted[index] = counted;
    if (counted.length >= parameters.transitions)
      speak(state, index, facts, counted[0] ?? now, isNearTripper(state, index, facts));
  }
  if (all.length >= parameters.transitions) takeBadDay(state, index, facts, parameters, all[0] ?? now);
}

function takeBadDay(state: State, index: number, facts: Facts, parameters: Parameters, from: number): void {
  const { localDay } = facts;
  const days = (state.days[index] ?? []).filter((day) => localDay - day < 7 && day !== localDay);
  state.days[index] = [...days, localDay];
  if (days.length + 1 >= parameters.days && state.burstAt === 0) speak(state, index, facts, from, true);
}

function speak(state: State, index: number, facts: Facts, from: number, atEdges: boolean): void {
  const fresh = !facts.stands('chattering-input');
  if (fresh) {
    state.from = from;
    state.input = index + 1;
    state.atEdges = atEdges;
    state.several = false;
    state.bursts = state.bursts.filter((at) => facts.now - at < 86_400_000);
  }
  state.several ||= state.input !== index + 1;
  const { now, localDay } = facts;
  if (now - state.burstAt > NEW_BURST_MS) {
    state.bursts = [...state.bursts, now].slice(-6);
    state.burstDays = [...state.burstDays.filter((day) => day !== localDay && localDay - day < 7), localDay];
  }
  state.burstAt = now;
}

/** The unrest began where the clock's own switch moves: the switch, not the wire. */
function isNearTripper({ edge }: State, index: number, { inputs, localMinute, now }: Facts): boolean {
  const began = localMinute - (now - (edge[index] ?? now)) / 60_000;
  return (inputs.windows[index] ?? []).some(({ onMinute, offMinute }) =>
    [onMinute, offMinute].some((minute) => Math.abs(clockDifference(minute, began)) <= NEAR_TRIPPER_MINUTES),
  );
}

/**
 * A switch bounces when it moves, and a worn one now and then, day after day. A contact that comes and goes while the
 * switch should hold is a wire, the more so again and again, or on several inputs: then it is the common one.
 */
function causeOf(state: State, { now }: Facts, parameters: Parameters): string {
  if (state.several) return 'loose-wire';
  const lately = state.bursts.filter((at) => now - at <= parameters.wireWithinSeconds * 1000);
  if (lately.length >= parameters.wireBursts) return 'loose-wire';
  return state.atEdges || state.burstDays.length >= parameters.days ? 'switch-failing' : 'loose-wire';
}

function describe(state: State, facts: Facts, parameters: Parameters): Finding {
  const { reading } = facts;
  const index = state.input - 1;
  return {
    cause: causeOf(state, facts, parameters),
    from: state.from,
    evidence: {
      input: state.input,
      transitions: state.all[index]?.length ?? 0,
      badDays: state.days[index]?.length ?? 0,
      atTrippers: state.atEdges,
      closedInputs: listClosedInputs(reading.closedInputs),
    },
  };
}

export const chatteringInput = defineDetector<'chattering-input', State>({
  detector: 'chattering-input',
  hears: ['reading'],
  initial: () => ({
    last: perInput(() => 0),
    edge: perInput(() => 0),
    counted: perInput(() => []),
    all: perInput(() => []),
    days: perInput(() => []),
    burstAt: 0,
    from: 0,
    input: 0,
    several: false,
    atEdges: false,
    bursts: [],
    burstDays: [],
  }),
  judge,
  delaySeconds: () => 0,
  describe,
});
