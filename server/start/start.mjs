/** `npm start`: sets up whatever is missing, starts everything, prints the address. */
import { ensureDependencies } from "./dependencies.mjs";
import { dataFolder } from "./place.mjs";
import { endWith, say } from "./say.mjs";

try {
  ensureDependencies();
  const { ensureClientBuild } = await import("./client-build.mjs");
  const { startStack, stopOnSignal } = await import("./stack.mjs");
  ensureClientBuild();
  const stack = await startStack({
    folder: dataFolder,
    port: Number(process.env.PORT ?? 4317),
    output: "inherit",
  });
  stopOnSignal(stack.stop);
  stack.serverProcess().once("exit", (code) => {
    if (code) stack.stop().finally(() => process.exit(1));
  });
  if (stack.mailboxUrl)
    say(`local stand-ins: invented accounts to sign in with; their mail is at ${stack.mailboxUrl}`);
  say(`Subleading is at ${stack.url}   (Ctrl-C stops everything)`);
} catch (error) {
  endWith(error);
}
