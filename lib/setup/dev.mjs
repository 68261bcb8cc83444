// npm run dev: the development server with the demo plant.
import { bin, choosePort, ensureModules, startChild } from "./ensure.mjs";

ensureModules();
const port = await choosePort();
startChild([bin.next, "dev", "-H", "127.0.0.1", "-p", String(port)], { APP_LOCAL: "1" });
