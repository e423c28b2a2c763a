/** Opens the site at an address, with a query cache of its own. */
import { QueryClientProvider } from "@tanstack/react-query";
import { render } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { MemoryRouter, useLocation } from "react-router-dom";
import { createQueryClient } from "../../client/app/providers.tsx";
import { Router } from "../../client/app/router.tsx";
import { currentNotices, putAway } from "../../client/ui/notices.ts";
import { NoticeRegion } from "../../client/ui/notice-region.tsx";

export function openSite(address: string) {
  // Notices outlive a page, as they should; not a test.
  for (const { id } of currentNotices()) putAway(id);
  const client = createQueryClient();
  client.setDefaultOptions({ queries: { ...client.getDefaultOptions().queries, retry: false } });
  let place = address;
  function Place() {
    const { pathname, search } = useLocation();
    place = pathname + search;
    return null;
  }
  const view = render(
    <QueryClientProvider client={client}>
      <MemoryRouter initialEntries={[address]}>
        <Router />
        <Place />
      </MemoryRouter>
      <NoticeRegion />
    </QueryClientProvider>,
  );
  return { ...view, client, user: userEvent.setup(), place: () => place };
}
