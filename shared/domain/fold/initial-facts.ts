import { listChangedSettings } from '../detectors/changed-settings.ts';
import type { Facts } from '../detectors/facts.ts';
import { createReportedFit } from '../detectors/reported-fit.ts';
import type { ControlCopy } from './control-copy.ts';
import type { PumpTrackers, SavedRecord } from './pump-trackers.ts';
import { restoreReading } from './reading-memory.ts';
import { READING_BEFORE_READINGS } from './resting-facts.ts';
import { restoreSettings } from './settings-memory.ts';

/** The facts as they stand before the next event, from what the trackers and the saved state know. */
export function initialFacts(
  trackers: PumpTrackers,
  control: ControlCopy,
  hot: SavedRecord,
  learnt: SavedRecord,
): Facts {
  const { pace, inputs, load, water, link, motorClock, pad, bank } = trackers;
  const { context } = pace;
  const reportedSettings = restoreSettings(learnt.reported);
  const facts: Facts = {
    kind: 'time',
    now: 0,
    receivedAt: 0,
    context,
    reading: restoreReading(hot.reading) ?? READING_BEFORE_READINGS,
    single: false,
    elapsedMs: 0,
    gap: false,
    reportsSource: hot.reportsSource === true,
    control,
    inputs: inputs.facts,
    load: load.facts,
    water: water.facts,
    link: link.facts,
    motorClock: motorClock.facts,
    localDay: 0,
    localWeekday: 0,
    localMinute: 0,
    zoneOffsetMinutes: 0,
    padState: pad.state(),
    onSite: pad.onSite(),
    onSiteEndedAt: pad.onSiteEndedAt(),
    reportedSettings,
    changedSettings: listChangedSettings(reportedSettings, context.settings),
    fitsReported: () => false,
    stands: bank.stands,
  };
  facts.fitsReported = createReportedFit(facts);
  return facts;
}
