/** A value outside React that components may follow: the crosshair, the live link, the theme. */
export type Store<Value> = {
  readonly get: () => Value;
  readonly set: (value: Value) => void;
  /** Answers the way to stop listening. */
  readonly subscribe: (listener: () => void) => () => void;
};

export function createStore<Value>(initial: Value): Store<Value> {
  let current = initial;
  const listeners = new Set<() => void>();
  return {
    get: () => current,
    set: (value) => {
      if (Object.is(value, current)) return;
      current = value;
      for (const listener of [...listeners]) listener();
    },
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
  };
}
