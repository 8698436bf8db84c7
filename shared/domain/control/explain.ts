import type { RunSource } from '../readings/reading.ts';
import type { Because, Decision } from './decision.ts';
import type { ExplainContext, ExplainOptions } from './explain-options.ts';
import { saySpeed, type Teller, tellerOf, type Words, wordsOf } from './explain-words.ts';
import { capitalise, fillMessage, firstKnownKey } from './fill-message.ts';
import { STANDSTILL_RPM } from './speed-tolerance.ts';

/** What there is to explain: a pump's state at an instant, as a screen's row has it. */
export type Explained = {
  readonly at: number;
  readonly rpm: number;
  readonly source: RunSource;
  readonly expectedSource: RunSource;
  readonly expectedRpm: number;
  readonly because: Because;
  readonly until: number | undefined;
  readonly lockedBy: number | undefined;
};

/**
 * A decision at an instant (ms) as something to explain: a motor that does what it should.
 *
 * @example explain(explainedDecision(decide(…), at), context, options)
 */
export function explainedDecision(decision: Decision, at: number): Explained {
  const { source, rpm, because, until, lockedBy } = decision;
  return { at, rpm, source, expectedSource: source, expectedRpm: rpm, because, until, lockedBy };
}

/**
 * Why a motor runs as it does, in a sentence or two for one of two readers, with times in the pad's zone. Says so
 * where the measured speed is not the one that is due. A homeowner is never told that a closed input keeps the pump
 * from being shut off.
 *
 * @example explain(now, context, { voice: 'homeowner', hour12: true, locale: 'en-US' }) // 'The evening program runs at 1,400 rpm until 10 PM.'
 */
export function explain(subject: Explained, context: ExplainContext, options: ExplainOptions): string {
  const teller = tellerOf(context, options);
  const sentences = options.voice === 'homeowner' ? tellHomeowner(subject, teller) : tellTechnician(subject, teller);
  return sentences.map(capitalise).join(' ');
}

/**
 * The same in a few words for a row of the fleet, without a full stop.
 *
 * @example explainShort(now, context, { voice: 'technician', hour12: true, locale: 'en-US' }) // 'Day program until 8 PM'
 */
export function explainShort(subject: Explained, context: ExplainContext, options: ExplainOptions): string {
  const teller = tellerOf(context, options);
  return capitalise(
    differs(subject) ? shortDifference(subject, teller) : reason('short', subject, subject.rpm, teller),
  );
}

function tellHomeowner(subject: Explained, teller: Teller): string[] {
  if (!differs(subject)) return [reason('homeowner', subject, subject.rpm, teller)];
  const words = { rpm: saySpeed(subject.rpm, teller), expected: saySpeed(subject.expectedRpm, teller) };
  if (stands(subject.rpm)) return [fillMessage(teller.message('homeowner.differs.stand'), words)];
  const key = stands(subject.expectedRpm) ? 'homeowner.differs.off' : 'homeowner.differs';
  return [fillMessage(teller.message(key), words)];
}

function tellTechnician(subject: Explained, teller: Teller): string[] {
  const { because, expectedRpm, expectedSource } = subject;
  const off = differs(subject);
  const sentences = [
    reason('technician', subject, off ? expectedRpm : subject.rpm, teller),
    ...tellInput(subject, teller),
  ];
  const words = { rpm: saySpeed(subject.rpm, teller), source: teller.message(`source.${subject.source}`) };
  if (off)
    sentences.push(
      fillMessage(teller.message(stands(subject.rpm) ? 'technician.differs.stand' : 'technician.differs'), words),
    );
  if (because.kind === 'stop' && !stands(expectedRpm)) {
    const due = { rpm: saySpeed(expectedRpm, teller), source: teller.message(`source.${expectedSource}`) };
    sentences.push(fillMessage(teller.message('technician.stop.due'), due));
  }
  return sentences;
}

function tellInput({ because, lockedBy, at, until }: Explained, teller: Teller): string[] {
  if (because.kind !== 'input') return [];
  const { words } = wordsOf(because, until, at, teller);
  const sentences: string[] = [];
  if (because.others.length > 0) sentences.push(fillMessage(teller.message('technician.input.others'), words));
  if (lockedBy !== undefined) sentences.push(teller.message('technician.input.locked'));
  if (!teller.context.traits.stopBeatsInputs) sentences.push(teller.message('technician.input.beats-stop'));
  return sentences;
}

/** The sentence of the reason, the most telling that its facts can fill. */
function reason(prefix: 'homeowner' | 'technician' | 'short', subject: Explained, rpm: number, teller: Teller): string {
  const because: Because = subject.source === 'no-data' ? { kind: 'no-data' } : subject.because;
  const { words, facets } = wordsOf(because, subject.until, subject.at, teller);
  const base = `${prefix}.${because.kind}`;
  const key = firstKnownKey([...facets.map((facet) => `${base}.${facet}`), base]);
  const all: Words = { ...words, rpm: saySpeed(rpm, teller) };
  return key === undefined ? '' : fillMessage(teller.message(key), all);
}

function shortDifference(subject: Explained, teller: Teller): string {
  const { message } = teller;
  const rpm = saySpeed(subject.rpm, teller);
  const source = message(`source.${subject.source}`);
  const doesKey = stands(subject.rpm)
    ? 'short.does.stand'
    : subject.source === 'unknown'
      ? 'short.does.run'
      : 'short.does.source';
  const does = fillMessage(message(doesKey), { rpm, source });
  const { words } = wordsOf(subject.because, subject.until, subject.at, teller);
  const due = message(`source.${subject.expectedSource}`);
  const key = firstKnownKey([`short.differs.${subject.because.kind}`]) ?? 'short.differs.other';
  return fillMessage(message(key), { ...words, source: due, does });
}

/** Whether the motor does something other than what is due; a believed keypad stop or fault explains itself. */
function differs({ source, expectedSource, because, rpm, expectedRpm }: Explained): boolean {
  if (source === 'no-data' || because.kind === 'stop' || because.kind === 'fault') return false;
  return source !== expectedSource && !(stands(rpm) && stands(expectedRpm));
}

function stands(rpm: number): boolean {
  return rpm <= STANDSTILL_RPM;
}
