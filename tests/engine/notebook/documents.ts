/** A small vocabulary for documents: blocks, rows and pins in ProseMirror's JSON. */
type Json = Record<string, unknown>;

export function documentOf(...content: unknown[]): Json {
  return { type: "doc", content };
}
export function paragraph(...content: unknown[]): Json {
  return { type: "paragraph", content };
}
export function block(type: string, attrs: Json, ...rows: unknown[]): Json {
  return { type, attrs, content: rows };
}
/** `cells` by field; the row's place is its order key. */
export function row(table: string, rowId: string, order: string, cells: Record<string, unknown>): Json {
  const content = Object.entries(cells).map(([field, value]) => ({ type: "cell", attrs: { field, value } }));
  return { type: "row", attrs: { table, rowId, order }, content };
}
export function pin(attrs: Json): Json {
  return { type: "pin", attrs };
}

/** A Truncation error block with X through orders 0, 1, 2. */
export function truncationBlock(blockId: string, attrs: Json = {}): Json {
  return block(
    "truncationError",
    { blockId, q: "0.3", ...attrs },
    row("orders", "a", "a", { order: "0", value: "10", name: "LO" }),
    row("orders", "b", "b", { order: "1", value: "10.9", name: "NLO" }),
    row("orders", "c", "c", { order: "2", value: "10.63" }),
  );
}
export function premisesBlock(blockId: string, attrs: Json = {}): Json {
  return block(
    "premises",
    { blockId, name: "Lantern", ...attrs },
    row("fields", "f1", "a", { symbol: "chi", kind: "real scalar" }),
    row("scales", "s1", "a", { symbol: "Lambda", value: "3.2 TeV", role: "heavy" }),
    row("scales", "s2", "b", { symbol: "p", value: "350 GeV", role: "probe" }),
    row("terms", "t1", "a", { term: "lambda/4! chi^4" }),
  );
}
