import { useEffect, useState } from 'react';

/** A value once it has not changed for a while: what is typed is not looked at letter by letter. */
export function useSettled<Value>(value: Value, afterMs: number): Value {
  const [settled, setSettled] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setSettled(value), afterMs);
    return () => clearTimeout(timer);
  }, [value, afterMs]);
  return settled;
}
