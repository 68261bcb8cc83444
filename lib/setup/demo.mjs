// npm run demo: installs, builds and starts Forebay with the demo plant, then prints its address.
import { bin, choosePort, ensureBuild, ensureModules, startChild, waitForHealth } from "./ensure.mjs";

ensureModules();
const port = await choosePort();
if (ensureBuild() !== 0) process.exit(1);

const child = startChild([bin.next, "start", "-H", "127.0.0.1", "-p", String(port)], { APP_LOCAL: "1" });
try {
  await waitForHealth(port, 120_000);
  console.log(
    `\nForebay is ready: http://127.0.0.1:${port}\nThe sign-in page shows the demo accounts. Stop with Ctrl+C.\n`,
  );
} catch (error) {
  console.error(error instanceof Error ? error.message : error);
  child.kill("SIGTERM");
}
