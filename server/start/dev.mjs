/** `npm run dev`: the same as `npm start`, with the page and the server reloaded when their sources change. */
import { ensureDependencies } from "./dependencies.mjs";
import { dataFolder } from "./place.mjs";
import { endWith, say } from "./say.mjs";

try {
  ensureDependencies();
  const { createServer } = await import("vite");
  const { freePort } = await import("./ports.mjs");
  const { startStack, stopOnSignal } = await import("./stack.mjs");
  const pagePort = await freePort(Number(process.env.PORT ?? 4317));
  const stack = await startStack({
    folder: dataFolder,
    publicPort: pagePort,
    watch: true,
    env: { NODE_ENV: "development" },
  });
  const target = `http://127.0.0.1:${stack.serverPort}`;
  const vite = await createServer({
    server: {
      host: "localhost",
      port: pagePort,
      strictPort: true,
      proxy: {
        // The page's own modules under client/api/ are Vite's to serve.
        "^/api/(?!.*\\.tsx?($|\\?))": { target },
        "^/(auth|healthz|readyz)": { target },
        "/collab": { target, ws: true },
      },
    },
  });
  await vite.listen();
  stopOnSignal(async () => {
    await vite.close();
    await stack.stop();
  });
  if (stack.mailboxUrl)
    say(`local stand-ins: invented accounts to sign in with; their mail is at ${stack.mailboxUrl}`);
  say(`Subleading (reloading) is at ${stack.url}`);
} catch (error) {
  endWith(error);
}
