// Runs every test once and ends with the one plain line that any tool can read: "N passed, N failed".
import { startVitest } from "vitest/node";

const vitest = await startVitest("test", process.argv.slice(2), { watch: false, run: true });
const tests = vitest.state.getFiles().flatMap(function collect(task) {
  return task.type === "test" ? [task] : (task.tasks ?? []).flatMap(collect);
});
const count = (state) => tests.filter((test) => test.result?.state === state).length;
const broken = vitest.state.getFiles().filter((file) => file.result?.state === "fail").length;
const failed = count("fail");
await vitest.close();
console.log(`${count("pass")} passed, ${failed} failed, ${tests.length - count("pass") - failed} skipped`);
process.exit(failed + broken > 0 || count("pass") === 0 ? 1 : 0);
