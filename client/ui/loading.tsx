import "./loading.css";

/** Something is on its way: a short engraved scale along which the hairline travels, and what is awaited in words. */
export function Loading({ what }: { readonly what: string }) {
  return (
    <p role="status" className="loading text-small text-ink-2">
      <span className="loading-scale" aria-hidden="true">
        <span className="loading-hairline" />
      </span>
      {what}
    </p>
  );
}
