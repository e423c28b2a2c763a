/** The other place where golden files are evaluated. */
import { parentPort, workerData } from "node:worker_threads";
import { evaluateGolden } from "./evaluate-golden.ts";

parentPort?.postMessage(evaluateGolden(workerData));
