/**
 * Why something is refused: a stable `reason`, the `field` it stands in (a path such as `points[2].watts`), and a
 * sentence that says what is allowed there.
 */
export type Refusal<Reason extends string = string> = {
  readonly reason: Reason;
  readonly field: string;
  readonly allowed: string;
};

/** A value, or every fault found, all at once. */
export type Outcome<Value, Reason extends string = string> =
  | { readonly ok: true; readonly value: Value }
  | Refused<Reason>;

export type Refused<Reason extends string = string> = {
  readonly ok: false;
  readonly refusals: readonly Refusal<Reason>[];
};

/** Wraps a good value. @example accepted(3) // { ok: true, value: 3 } */
export const accepted = <Value>(value: Value): { readonly ok: true; readonly value: Value } => ({ ok: true, value });

/** Wraps the faults found. @example refused([]).ok // false */
export const refused = <Reason extends string>(refusals: readonly Refusal<Reason>[]): Refused<Reason> => ({
  ok: false,
  refusals,
});
