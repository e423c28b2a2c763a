import { StrictMode } from "react";
import { createRoot } from "react-dom/client";
import "./main.css";
import { Providers } from "./providers.tsx";
import { Router } from "./router.tsx";
import { followTheme } from "./theme.ts";

followTheme();

const place = document.getElementById("root");
if (!place) throw new Error("index.html has no #root");

createRoot(place).render(
  <StrictMode>
    <Providers>
      <Router />
    </Providers>
  </StrictMode>,
);
