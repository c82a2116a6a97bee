import { HOLE_RADIUS, NUT_PATH } from "~/components/plates/castle-nut";

/** The mark of the house: a castle nut from above, the same drawing as the progress glyph. */
export function Brand() {
  return (
    <span className="flex items-center gap-2.5 font-figure text-2xl font-semibold text-on-graphite">
      <svg viewBox="0 0 36 36" width={32} height={32} aria-hidden="true">
        <path d={NUT_PATH} className="fill-brand" />
        <circle cx={18} cy={18} r={HOLE_RADIUS} className="fill-enamel-deep" />
      </svg>
      Castlenut
    </span>
  );
}
