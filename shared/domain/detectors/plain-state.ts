/** What a state may hold: plain JSON. */
export type Json = null | boolean | number | string | readonly Json[] | { readonly [key: string]: Json };

/** A rule's or tracker's memory: a flat record of plain values, changed in place. */
export type PlainState = { [key: string]: Json };

/**
 * A state read back from storage: every key of `initial` whose saved value has the same shape, the initial value for
 * the rest. What is damaged is forgotten, never thrown.
 *
 * @example restoreState({ tries: 0, note: '' }, { tries: 2, note: 7 }) // { tries: 2, note: '' }
 */
export function restoreState<State extends PlainState>(initial: State, saved: unknown): State {
  if (!isRecord(saved)) return initial;
  const restored: PlainState = { ...initial };
  for (const key of Object.keys(initial)) {
    const value = saved[key];
    if (isJson(value) && hasShape(value, initial[key])) restored[key] = value;
  }
  return restored as State;
}

/**
 * What of a state differs from how it began, copied: `restoreState` makes the rest up again. Undefined where nothing
 * does, so that nothing needs storing.
 *
 * @example saveChanges({ tries: 0, note: '' }, { tries: 2, note: '' }) // { tries: 2 }
 */
export function saveChanges(initial: PlainState, state: PlainState): PlainState | undefined {
  const changed = Object.entries(state).filter(([key, value]) => !isSame(initial[key] ?? null, value));
  if (changed.length === 0) return undefined;
  return Object.fromEntries(changed.map(([key, value]) => [key, copyJson(value)]));
}

function isSame(before: Json, now: Json): boolean {
  if (before === now) return true;
  if (Array.isArray(before) && Array.isArray(now)) {
    return before.length === now.length && before.every((value, index) => isSame(value, now[index] ?? null));
  }
  if (!isJsonRecord(before) || !isJsonRecord(now)) return false;
  const keys = Object.keys(before);
  return keys.length === Object.keys(now).length && keys.every((key) => isSame(before[key] ?? null, now[key] ?? null));
}

function isJsonRecord(value: Json): value is { readonly [key: string]: Json } {
  return isRecord(value);
}

/**
 * A copy that later changes in place do not reach.
 *
 * @example copyJson({ edges: [1, 2] }) // { edges: [1, 2] }
 */
export function copyJson<Value extends Json>(value: Value): Value {
  return copy(value) as Value;
}

function copy(value: Json): Json {
  if (Array.isArray(value)) return value.map(copy);
  if (!isRecord(value)) return value;
  const result: { [key: string]: Json } = {};
  for (const [key, entry] of Object.entries(value)) result[key] = copy(entry as Json);
  return result;
}

export function isRecord(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

function hasShape(value: Json, template: Json | undefined): boolean {
  if (Array.isArray(template)) return Array.isArray(value);
  // Null marks a figure that is not known yet.
  if (template === null) return value === null || typeof value === 'number';
  return typeof value === typeof template && value !== null && !Array.isArray(value);
}

function isJson(value: unknown): value is Json {
  if (value === null || typeof value === 'string' || typeof value === 'boolean') return true;
  if (typeof value === 'number') return Number.isFinite(value);
  if (Array.isArray(value)) return value.every(isJson);
  return isRecord(value) && Object.values(value).every(isJson);
}
