import { expect, test } from "vitest";
import { NoiseError } from "../../src/ground/errors.js";
import { readBand } from "../../src/ground/read-band.js";

test.each([
  ["0.1Hz:80Hz", 0.1, 80],
  ["0.1:80 Hz", 0.1, 80],
  ["10 Hz : 20 kHz", 10, 20_000],
  ["1k:10k", 1000, 10_000],
  ["0:10kHz", 0, 10_000],
  ["0:inf", 0, Number.POSITIVE_INFINITY],
  ["1Hz:∞", 1, Number.POSITIVE_INFINITY],
  ["1 Hz:inf Hz", 1, Number.POSITIVE_INFINITY],
  ["0,1Hz:10Hz", 0.1, 10],
  ["100 mHz:1 MHz", 0.1, 1e6],
])("%s", (text, fromHz, toHz) => {
  expect(readBand(text)).toEqual({ fromHz, toHz });
});

test.each([
  ["0.1:80", "Expected a band with units at its edges, such as 0.1Hz:80Hz"],
  ["1:20 kHz", "Expected a band with units at its edges"],
  ["1Hz", "Expected a band"],
  ["1Hz:2Hz:3Hz", "Expected a band"],
  [":2Hz", "Expected a band"],
  ["", "Expected a band"],
  ["1V:2V", "is in V"],
  ["80Hz:1Hz", "toHz, the upper band edge"],
  ["inf:inf", "fromHz, the lower band edge"],
  ["-1Hz:1Hz", "fromHz, the lower band edge"],
  ["a:b", "does not begin with a number"],
])("refuses %j", (text, said) => {
  expect(() => readBand(text)).toThrow(NoiseError);
  expect(() => readBand(text)).toThrow(said);
});
