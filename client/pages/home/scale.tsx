/**
 * The first screen's one drawing: a logarithmic scale of sizes, the hairline at one per mille, and what lies beyond it
 * hatched as left out. Drawn from the logarithm itself; it stands for nothing computed and is hidden from readers' ears.
 */
const DECADES = 6;
const WIDTH = 1200;
const HEIGHT = 64;
const perDecade = WIDTH / DECADES;
const hairline = 3 * perDecade;

const ticks = Array.from({ length: DECADES }, (_, decade) =>
  [1, 2, 3, 4, 5, 6, 7, 8, 9].map((digit) => ({
    x: (decade + 1 - Math.log10(digit)) * perDecade,
    length: digit === 1 ? 22 : digit === 5 ? 14 : 8,
  })),
).flat();

export function Scale() {
  return (
    <svg
      className="mt-8 block h-16 w-full"
      viewBox={`0 0 ${WIDTH} ${HEIGHT}`}
      preserveAspectRatio="xMidYMid slice"
      aria-hidden="true"
      focusable="false"
    >
      <defs>
        <pattern
          id="left-out"
          width="7"
          height="7"
          patternUnits="userSpaceOnUse"
          patternTransform="rotate(45)"
        >
          <path d="M0 0v7" stroke="var(--hatch)" strokeWidth="2" />
        </pattern>
      </defs>
      <rect x={hairline} y="0" width={WIDTH - hairline} height="40" fill="url(#left-out)" />
      <path d={`M0 40H${WIDTH}`} stroke="var(--ink)" />
      <path d={ticks.map(({ x, length }) => `M${x.toFixed(1)} 40v${length}`).join("")} stroke="var(--tick)" />
      <path d={`M${hairline} 0V${HEIGHT}`} stroke="var(--hairline)" strokeWidth="1.5" />
    </svg>
  );
}
