/** The mark: four ticks of a scale, the last one the hairline. */
export function Mark({ size = 22 }: { readonly size?: number }) {
  return (
    <svg
      width={size}
      height={size}
      viewBox="0 0 24 24"
      fill="none"
      strokeWidth="1.75"
      aria-hidden="true"
      focusable="false"
    >
      <path d="M3 4v16M9 11v9M15 14.5v5.5" stroke="currentColor" />
      <path d="M21 7v13" stroke="var(--hairline)" />
    </svg>
  );
}
