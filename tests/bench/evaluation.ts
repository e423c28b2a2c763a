/**
 * node --import tsx tests/bench/evaluation.ts
 *
 * What a changed premise costs in a notebook of a hundred blocks: in the engine alone, and on the page with its worker;
 * and what truncation errors along x cost.
 * Takes a PostgreSQL from SUBLEADING_TEST_DATABASE_URL or DATABASE_URL, Chromium from CHROMIUM_PATH, and the built page.
 * Figures and ratios only; the aims stand beside them.
 */
import { printClosureTimes } from "./closure-times.ts";
import { printEngineTimes } from "./engine-times.ts";
import { printPageTimes } from "./page-times.ts";
import { printGraphTimes } from "./graphs-times.ts";
import { printTruncationTimes } from "./truncation-times.ts";

process.env["SUBLEADING_TEST_DATABASE_URL"] ??= process.env["DATABASE_URL"];

printEngineTimes();
console.log("");
printTruncationTimes();
printGraphTimes();
console.log("");
printClosureTimes();
console.log("");
await printPageTimes();
