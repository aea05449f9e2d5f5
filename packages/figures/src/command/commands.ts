import { budgetCommand } from "./budget.js";
import { checkCommand } from "./check.js";
import type { Command } from "./command.js";
import { compareCommand } from "./compare.js";
import { fitCommand } from "./fit.js";
import { noiseCommand } from "./noise.js";
import { plotCommand } from "./plot.js";
import { readCommand } from "./read.js";
import { reportCommand } from "./report.js";

/** Every command, in the order a curve goes through them. */
export const commands: readonly Command[] = Object.freeze([
  readCommand,
  fitCommand,
  noiseCommand,
  checkCommand,
  plotCommand,
  compareCommand,
  budgetCommand,
  reportCommand,
]);
