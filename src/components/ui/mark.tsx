/** Millrace's mark: a mill wheel over its race. */
export function Mark({ size = 28 }: { readonly size?: number }) {
  return (
    <svg width={size} height={size} viewBox="0 0 28 28" aria-hidden="true" className="shrink-0">
      <g fill="none" stroke="currentColor" strokeWidth="2" strokeLinecap="square">
        <circle cx="14" cy="12" r="7.5" />
        <path d="M14 2.2v19.6M4.2 12h19.6M7.07 5.07l13.86 13.86M20.93 5.07 7.07 18.93" />
        <path d="M2 26h24" />
      </g>
      <circle cx="14" cy="12" r="2.4" className="fill-sheet" stroke="currentColor" strokeWidth="2" />
    </svg>
  );
}
