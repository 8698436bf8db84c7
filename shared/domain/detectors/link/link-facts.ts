/** A time without readings that ended: device time, ms. `booted` = the motor unit started anew, so it had lost power. */
export type Outage = { readonly from: number; readonly to: number; readonly booted: boolean };

/** What is known of the way to the device. */
export type LinkFacts = {
  /** Arrival of the last word of any kind, ms; 0 = none yet. */
  lastWordAt: number;
  /** Since when the server has been listening without a break, as far as it counts for silence, ms. */
  listeningSince: number;
  /** Words have been arriving without a break of the silence limit since, ms. */
  heardSince: number;
  /** What the last status said; `unknown` before any. */
  connection: 'online' | 'lost' | 'unknown';
  /** When the connection dropped, at its arrival, ms; 0 while it stands or nothing is known of it. */
  lostAt: number;
  /** The device has reported its boots, so that a cut without a new boot was none. */
  reportsBoots: boolean;
  /** The last status brought a new boot, at its arrival; 0 = never. */
  bootedAt: number;
  /** Reconnected under the same boot, at its arrival; 0 = never. */
  resumedAt: number;
  /** The device alone began anew, while the motor ran on, at its arrival; 0 = never. */
  restartedAt: number;
  /** When a word ended a silence through which the connection had stayed: the device was there and said nothing. */
  connectedThroughAt: number;
  /** The last outages, oldest first. */
  outages: readonly Outage[];
  /** An outage ended with this reading. */
  outageEnded: boolean;
};
