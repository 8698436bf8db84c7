/** A pump's state row as its new owner read it. */
export type ClaimedState = {
  readonly pumpId: string;
  readonly cursor: number;
  readonly hot: unknown;
  readonly learnt: unknown;
  readonly learntVersion: number;
  readonly heardAt: number | undefined;
  readonly silentSince: number | undefined;
  readonly lostAt: number | undefined;
  readonly quarantined: boolean;
  /** Another living process folded it until now: something of its making may still be on its way into the database. */
  readonly takenOver: boolean;
};
