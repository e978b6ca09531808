/** Prints "N passed, N failed" from the JSON report of vitest; status 1 if anything failed or nothing ran. */
import { readFileSync } from "node:fs";

const text = readFileSync(process.argv[2], "utf8");
const files = text ? JSON.parse(text).testResults : [];
const tests = files.flatMap((file) => file.assertionResults);
const count = (status) => tests.filter((test) => test.status === status).length;

const passed = count("passed");
// A file that fails although none of its tests did could not be loaded; it counts as one.
const broken = files.filter((f) => f.status === "failed" && !f.assertionResults.some((t) => t.status === "failed"));
const failed = count("failed") + broken.length + (tests.length + broken.length === 0 ? 1 : 0);
const idle = tests.length - passed - count("failed");

if (idle > 0) console.log(`${idle} did not run`);
console.log(`${passed} passed, ${failed} failed`);
process.exitCode = failed > 0 ? 1 : 0;
