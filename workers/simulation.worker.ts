import { expose } from "comlink";
import { createSimulationApi } from "./simulation-api";

expose(createSimulationApi(() => performance.now()));
