import { QueryClient, QueryClientProvider } from "@tanstack/react-query";
import { useState, type ReactNode } from "react";
import { BrowserRouter } from "react-router-dom";
import { RequestRefused } from "../api/problem.ts";
import { NoticeRegion } from "../ui/notice-region.tsx";

/** A refusal is an answer: only silence and a stumbling server are worth asking again. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 10_000,
        retry: (failures, error) =>
          failures < 2 &&
          error instanceof RequestRefused &&
          (error.problem.status === 0 || error.problem.status >= 500),
      },
    },
  });
}

export function Providers({ children }: { readonly children: ReactNode }) {
  const [client] = useState(createQueryClient);
  return (
    <QueryClientProvider client={client}>
      <BrowserRouter>{children}</BrowserRouter>
      <NoticeRegion />
    </QueryClientProvider>
  );
}
