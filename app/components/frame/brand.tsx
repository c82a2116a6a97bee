/** The mark of the house: a castle nut from above, the same drawing as the progress glyph. */
export function Brand() {
  return (
    <span className="flex items-center gap-2.5 font-figure text-2xl font-semibold text-on-graphite">
      <svg viewBox="0 0 36 36" width={30} height={30} aria-hidden="true">
        <polygon points="33,18 25.5,30.99 10.5,30.99 3,18 10.5,5.01 25.5,5.01" className="fill-brass-tint" />
        <circle cx={18} cy={18} r={5.2} className="fill-enamel-deep" />
        {[0, 60, 120, 180, 240, 300].map((turn) => (
          <rect
            key={turn}
            x={16}
            y={4}
            width={4}
            height={5.6}
            transform={`rotate(${turn} 18 18)`}
            className="fill-enamel-deep"
          />
        ))}
      </svg>
      Castlenut
    </span>
  );
}
