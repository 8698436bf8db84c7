/** What the speed inputs do, for the rules. Masks: bit 0 = input 1. */
export type InputFacts = {
  /** Inputs that have a speed. */
  wired: number;
  /** Closed or opened since the reading before; 0 across a gap, where nobody saw the edge. */
  closedEdges: number;
  openedEdges: number;
};
