/** A pump's day as one pen line on ruled paper: decoration for a page that has no strip of its own. */
export function DayTrace() {
  return (
    <div aria-hidden="true" className="ruled border-b border-rule">
      <svg aria-hidden="true" viewBox="0 0 448 64" className="block h-16 w-full" preserveAspectRatio="none">
        <path d="M0 58h75V37h79V17h66v-0h26v6h52v14h68v21h82" className="fill-wash" />
        <path
          d="M0 58h72V8h3v29h79V17h92v6h52v14h68v21h82"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.8"
          vectorEffect="non-scaling-stroke"
        />
      </svg>
    </div>
  );
}
