import { useState } from 'react';

const MOST_STEPS = 100;

type Steps<Value> = { readonly value: Value | undefined; readonly before: readonly (Value | undefined)[] };

/**
 * What is being edited, with a way back step by step; undefined = as it is stored. Steps that only type on in one field are
 * one: `key` names the field.
 */
export function useStepBack<Value>() {
  const [{ value, before }, setSteps] = useState<Steps<Value>>({ value: undefined, before: [] });
  const [lastKey, setLastKey] = useState<string>();
  return {
    value,
    canStepBack: before.length > 0,
    change: (next: Value, key?: string): void => {
      const isSameStep = key !== undefined && key === lastKey && before.length > 0;
      setLastKey(key);
      setSteps({ value: next, before: isSameStep ? before : [...before, value].slice(-MOST_STEPS) });
    },
    stepBack: (): void => {
      setLastKey(undefined);
      setSteps({ value: before.at(-1), before: before.slice(0, -1) });
    },
    clear: (): void => {
      setLastKey(undefined);
      setSteps({ value: undefined, before: [] });
    },
  };
}
