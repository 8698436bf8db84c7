import type { Detector, Evidence } from '../detectors/detector.ts';
import { DETECTOR_DEFAULTS } from '../detectors/detector-defaults.data.ts';
import { AIR_SHARE } from '../detectors/load/primed-watts.ts';
import type { Sign, Signs } from './sign.ts';

/** An alarm as its detector left it: the cause it named and the figures behind it. */
export type AlarmEvidence = { readonly detector: Detector; readonly cause: string; readonly evidence: Evidence };

/** Watts this far over the usual are more than a rub or an open valve takes. */
const { farAboveShare: FAR_OVER_SHARE } = DETECTOR_DEFAULTS['high-load'];
/** A drive this hot is hot where its model's limit is not known; five under the usual 90 °C. */
const HOT_CELSIUS = 85;
const HOT_DAY_CELSIUS = 32;
const LOW_VOLTS_SHARE = 0.95;
/** So much slower from the first start of the list to the last is a trend. */
const SLOWER_RATIO = 1.2;

type Known = (sign: Sign, value: boolean | undefined) => void;
type Figures = (key: string) => number | undefined;

/**
 * What an alarm's own figures say about its causes. A figure that is not there, or is no number, says nothing.
 *
 * @example signsOfEvidence({ detector: 'failed-prime', cause: 'unknown', evidence: { loadShare: 0.33 } })
 * // { 'some-load': false, 'air-from-the-start': true }
 */
export function signsOfEvidence(alarm: AlarmEvidence): Signs {
  const signs: Partial<Record<Sign, boolean>> = {};
  const know: Known = (sign, value) => {
    if (value !== undefined) signs[sign] = value;
  };
  const figure: Figures = (key) => {
    const value = alarm.evidence[key];
    return typeof value === 'number' && Number.isFinite(value) ? value : undefined;
  };
  readSurroundings(alarm, figure, know);
  readLoad(alarm, figure, know);
  readClocks(alarm, know);
  return signs;
}

const test = (value: number | undefined, holds: (value: number) => boolean): boolean | undefined =>
  value === undefined ? undefined : holds(value);

const flagOf = (evidence: Evidence, key: string): boolean | undefined => {
  const value = evidence[key];
  return typeof value === 'boolean' ? value : undefined;
};

function readSurroundings({ evidence, detector }: AlarmEvidence, figure: Figures, know: Known): void {
  const limit = figure('limitCelsius');
  know(
    'drive-hot',
    test(figure('driveCelsius'), (value) => value >= (limit === undefined ? HOT_CELSIUS : limit - 5)),
  );
  const ambient = figure('ambientCelsius') ?? figure('lastAmbientCelsius');
  know(
    'frost',
    test(ambient, (value) => value <= 0),
  );
  know(
    'heat',
    test(ambient, (value) => value >= HOT_DAY_CELSIUS),
  );
  const [volts, nominal] = [figure('volts'), figure('nominalVolts')];
  if (volts !== undefined && nominal !== undefined && nominal > 0) {
    know('low-voltage', volts < LOW_VOLTS_SHARE * nominal);
    know('high-voltage', volts > nominal * (2 - LOW_VOLTS_SHARE));
  }
  if ('fault' in evidence || evidence.saysSource === 'fault')
    know('fault-code', typeof evidence.fault === 'string' || evidence.saysSource === 'fault');
  know('our-visit', flagOf(evidence, 'sinceOurVisit') === true ? true : undefined);
  know('new-boot', flagOf(evidence, 'newBoot'));
  if (detector === 'energized-without-flow')
    know(
      'standing',
      test(figure('rpm'), (rpm) => rpm === 0),
    );
}

function readLoad({ evidence, detector, cause }: AlarmEvidence, figure: Figures, know: Known): void {
  const share = figure('loadShare');
  const cameAndWent = flagOf(evidence, 'loadCameAndWent');
  know('load-comes-and-goes', cameAndWent);
  const noFlow = flagOf(evidence, 'wattsOfNoFlow');
  know('load-of-a-shut-valve', noFlow);
  know(
    'far-over-usual',
    test(figure('rise'), (over) => over >= FAR_OVER_SHARE),
  );
  const priming = detector === 'failed-prime' || detector === 'slow-prime';
  // The load of a shut valve is some load too, and says nothing more.
  if ((priming || detector === 'loss-of-prime') && noFlow !== true)
    know(
      'some-load',
      test(share, (value) => value >= AIR_SHARE),
    );
  if (priming)
    know(
      'air-from-the-start',
      test(share, (value) => value < AIR_SHARE && cameAndWent !== true),
    );
  if (detector === 'slow-prime') know('slower-each-start', isSlowing(evidence.recentSeconds));
  if (detector === 'too-little-water') know('flow-too-low', cause === 'low-flow');
}

/** The later half of the starts took clearly longer than the earlier one; fewer than four say nothing. */
function isSlowing(seconds: Evidence[string] | undefined): boolean | undefined {
  if (!Array.isArray(seconds)) return undefined;
  const starts = seconds.filter((value): value is number => typeof value === 'number' && value > 0);
  if (starts.length < 4) return undefined;
  const half = Math.floor(starts.length / 2);
  const sum = (list: readonly number[]): number => list.reduce((total, value) => total + value, 0);
  return sum(starts.slice(-half)) >= SLOWER_RATIO * sum(starts.slice(0, half));
}

function readClocks({ evidence, detector, cause }: AlarmEvidence, know: Known): void {
  if (detector === 'fed-through-clock') know('same-time-each-day', true);
  const shifts = detector === 'clock-shift' || detector === 'motor-clock' || detector === 'unexpected-run';
  if (!shifts) return;
  if (cause === 'power-cut') know('power-cut', true);
  if (cause === 'daylight-saving') know('clocks-shifted', true);
  if (cause === 'drift' || cause === 'trippers-moved') {
    know('slow', cause === 'drift');
    know('sudden', cause !== 'drift');
  }
  const { inputs } = evidence;
  if (detector === 'clock-shift' && Array.isArray(inputs) && inputs.length > 1) know('all-inputs', true);
}
