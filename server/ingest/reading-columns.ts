import { type Reading, SOURCES, type Source } from '#shared/domain/readings/reading.ts';
import { createColumnText } from './array-literal.ts';
import { SINGLE_FLAG } from './reading-row.ts';

/** How the source is stored: its place in the list. */
const SOURCE_PLACES: ReadonlyMap<Source, number> = new Map(SOURCES.map((source, place) => [source, place]));

/** The readings of a batch, column by column, in the order of the insert statement. */
export type ReadingColumns = {
  readonly add: (reading: Reading, place: number, pumpNumber: number, receivedAt: number, single: boolean) => void;
  readonly toParameters: () => string[];
};

/** No reading yet. */
export function createReadingColumns(): ReadingColumns {
  let [at, received, places, pumps, rpm, watts, closed, active, flags] = ['', '', '', '', '', '', '', '', ''];
  const volts = createColumnText();
  const drive = createColumnText();
  const ambient = createColumnText();
  const source = createColumnText();
  const clock = createColumnText();
  const fault = createColumnText();
  return {
    add: (reading, place, pumpNumber, receivedAt, single) => {
      const comma = at === '' ? '' : ',';
      at += `${comma}${reading.at}`;
      received += `${comma}${receivedAt}`;
      places += `${comma}${place}`;
      pumps += `${comma}${pumpNumber}`;
      rpm += `${comma}${reading.rpm}`;
      watts += `${comma}${reading.watts}`;
      closed += `${comma}${reading.closedInputs}`;
      active += `${comma}${reading.activeInput}`;
      flags += `${comma}${single ? SINGLE_FLAG : 0}`;
      volts.addNumber(reading.volts);
      drive.addNumber(reading.driveCelsius);
      ambient.addNumber(reading.ambientCelsius);
      source.addNumber(reading.reportedSource === undefined ? undefined : SOURCE_PLACES.get(reading.reportedSource));
      clock.addNumber(reading.motorClockMinute);
      fault.addText(reading.fault);
    },
    toParameters: () => [
      ...[at, received, places, pumps, rpm, watts, closed, active, flags].map((text) => `{${text}}`),
      ...[volts, drive, ambient, source, clock, fault].map((column) => column.toParameter()),
    ],
  };
}
