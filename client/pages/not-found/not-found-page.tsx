import { PageFrame } from "../../ui/page-frame.tsx";
import { TextLink } from "../../ui/text-link.tsx";

export function NotFoundPage() {
  return (
    <PageFrame title="Not found" width="measure">
      <h1 className="font-prose text-title leading-tight">There is nothing at this address</h1>
      <p className="mt-4 text-lead">
        It may have been mistyped, deleted, or shared with another account. Go{" "}
        <TextLink to="/">to the first page</TextLink>.
      </p>
    </PageFrame>
  );
}
