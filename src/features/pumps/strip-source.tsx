import { useQuery } from '@tanstack/react-query';
import { type ReactNode, useMemo } from 'react';
import type { StripState } from '#src/components/charts/strip/strip-run.ts';
import type { TimeWindow } from './align-window.ts';
import { pumpQueries } from './pump-queries.ts';

export type StripSourceProps = {
  readonly pumpId: string;
  readonly window: TimeWindow;
  readonly children: (strip: StripState) => ReactNode;
};

/** The runs and plan of one pump in a window, kept live. */
export function useStrip(pumpId: string, window: TimeWindow): StripState {
  const { data, isError } = useQuery(pumpQueries.strip(pumpId, window));
  return useMemo(() => ({ runs: data?.runs, planned: data?.planned ?? [], failed: isError }), [data, isError]);
}

/** Brings them to whatever draws them. */
export function StripSource({ pumpId, window, children }: StripSourceProps) {
  return children(useStrip(pumpId, window));
}
