import { lazy, Suspense } from "react";
import { Route, Routes, useLocation } from "react-router-dom";
import { useMe } from "../api/me.ts";
import { Loading } from "../ui/loading.tsx";
import { FocusOnArrival } from "./focus-on-arrival.tsx";
import { PageBoundary } from "./page-boundary.tsx";
import { SignedInOnly } from "./signed-in-only.tsx";

const HomePage = lazy(async () => ({ default: (await import("../pages/home/home-page.tsx")).HomePage }));
const ShelfPage = lazy(async () => ({ default: (await import("../pages/shelf/shelf-page.tsx")).ShelfPage }));
const NotebookPage = lazy(async () => ({
  default: (await import("../pages/notebook/notebook-page.tsx")).NotebookPage,
}));
const SharingPage = lazy(async () => ({
  default: (await import("../pages/sharing/sharing-page.tsx")).SharingPage,
}));
const RefereePage = lazy(async () => ({
  default: (await import("../pages/referee/referee-page.tsx")).RefereePage,
}));
const PartsPage = lazy(async () => ({ default: (await import("../pages/parts/parts-page.tsx")).PartsPage }));
const NotFoundPage = lazy(async () => ({
  default: (await import("../pages/not-found/not-found-page.tsx")).NotFoundPage,
}));

export function Router() {
  const { pathname } = useLocation();
  return (
    <PageBoundary resetKey={pathname}>
      <FocusOnArrival />
      <Suspense fallback={<PageLoading />}>
        <Routes>
          <Route path="/" element={<FirstPage />} />
          <Route path="/shelf" element={<SignedInOnly page={<ShelfPage />} />} />
          <Route path="/notebooks/:id" element={<SignedInOnly page={<NotebookPage />} />} />
          <Route path="/notebooks/:id/sharing" element={<SignedInOnly page={<SharingPage />} />} />
          <Route path="/r/:token" element={<RefereePage />} />
          <Route path="/parts" element={<PartsPage />} />
          <Route path="*" element={<NotFoundPage />} />
        </Routes>
      </Suspense>
    </PageBoundary>
  );
}

/** Signed out: what this is. Signed in: the shelf. */
function FirstPage() {
  const me = useMe();
  if (me.isPending) return <PageLoading />;
  return me.data?.person ? <ShelfPage /> : <HomePage />;
}

function PageLoading() {
  return (
    <main id="main" tabIndex={-1} className="px-4">
      <Loading what="Opening the page" />
    </main>
  );
}
