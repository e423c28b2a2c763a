/** Figures as a bench prints them. */
export function median(values: readonly number[]): number {
  const sorted = [...values].sort((a, b) => a - b);
  return sorted[Math.floor(sorted.length / 2)] ?? Number.NaN;
}

export function milliseconds(value: number | undefined): string {
  return value === undefined || Number.isNaN(value) ? "-" : `${value.toFixed(1)} ms`;
}

/** Rows under each other, the first cell to the left and the others to the right. */
export function columns(rows: readonly (readonly string[])[]): void {
  const widths = (rows[0] ?? []).map((_, column) =>
    Math.max(...rows.map((row) => (row[column] ?? "").length)),
  );
  for (const row of rows) {
    const cells = widths.map((width, column) => {
      const cell = row[column] ?? "";
      return column === 0 ? cell.padEnd(width) : cell.padStart(width);
    });
    console.log(`  ${cells.join("   ")}`.trimEnd());
  }
}
