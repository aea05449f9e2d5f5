import { describe, expect, test } from "vitest";
import { normalFrom, uniformFrom } from "../../../../test/support/random.js";
import { expectRelative } from "../../../../test/support/relative.js";
import { type AxesDescription, calibrateAxes } from "../../src/curve/calibrate-axes.js";
import { MalformedDataError, NoiseError } from "../../src/ground/errors.js";

const plot: AxesDescription = {
  unit: "V",
  frequency: {
    kind: "log",
    ticks: [
      { pixel: 100, value: 1 },
      { pixel: 300, value: 100 },
      { pixel: 500, value: 1e4 },
    ],
  },
  density: {
    kind: "log",
    ticks: [
      { pixel: 400, value: 1e-9 },
      { pixel: 200, value: 1e-8 },
    ],
  },
};

describe("axes along the pixels", () => {
  test("log, linear and dB axes read what stands at their ticks and between, y downwards", () => {
    const log = calibrateAxes(plot).pointAt(200, 300);
    expectRelative(log.frequency, 10, 1e-13);
    expectRelative(log.density, Math.sqrt(1e-17), 1e-13);
    const mixed = calibrateAxes({
      unit: "V",
      frequency: {
        kind: "linear",
        ticks: [
          { pixel: 0, value: 0 },
          { pixel: 100, value: 50 },
        ],
      },
      density: {
        kind: "dB",
        ticks: [
          { pixel: 300, value: -160 },
          { pixel: 100, value: -120 },
        ],
      },
    }).pointAt(20, 200);
    expectRelative(mixed.frequency, 10, 1e-13);
    expectRelative(mixed.density, 1e-7, 1e-13);
  });

  test("more than two ticks are fitted, and the worst is told in pixels", () => {
    const ticks = [
      { pixel: 100, value: 1 },
      { pixel: 301.5, value: 100 },
      { pixel: 500, value: 1e4 },
    ];
    const { worst } = calibrateAxes({ ...plot, frequency: { kind: "log", ticks } });
    expect(worst.name).toBe("frequency tick 2");
    expectRelative(worst.pixels, 1, 1e-12);
  });

  test("a point more than a decade beyond the outer ticks is refused unless allowed", () => {
    expect(() => calibrateAxes(plot).pointAt(650, 300)).toThrow(
      /more than a decade beyond the outer ticks of the frequency axis/,
    );
    expect(calibrateAxes({ ...plot, allowFarExtrapolation: true }).pointAt(650, 300).frequency).toBeGreaterThan(1e5);
  });
});

test("a scan rotated by 15° and sheared reads through reference points", () => {
  const turn = (15 * Math.PI) / 180;
  const placed = (u: number, v: number): { x: number; y: number } => {
    const [x, y] = [100 + 80 * u + 9 * v, 500 - 120 * v];
    return { x: Math.cos(turn) * x - Math.sin(turn) * y, y: Math.sin(turn) * x + Math.cos(turn) * y };
  };
  const referencePoints = [
    [0, 0],
    [4, 0],
    [0, 2],
    [4, 2],
  ].map(([u = 0, v = 0]) => ({ ...placed(u, v), frequency: 10 ** u, density: 1e-9 * 10 ** v }));
  const scan = calibrateAxes({ unit: "V", frequency: { kind: "log" }, density: { kind: "log" }, referencePoints });
  const { x, y } = placed(2.5, 0.7);
  expectRelative(scan.pointAt(x, y).frequency, 10 ** 2.5, 1e-11);
  expectRelative(scan.pointAt(x, y).density, 1e-9 * 10 ** 0.7, 1e-11);
  expect(scan.worst.pixels).toBeLessThan(1e-9);
});

describe("a wrong tick among four or more is named", () => {
  const uniform = uniformFrom(20);
  const normal = normalFrom(uniform);
  const drawn = (): { pixel: number; value: number }[] => {
    const count = 4 + Math.floor(uniform() * 4);
    const [origin, decade] = [uniform() * 100, 40 + uniform() * 300];
    const first = Math.round(uniform() * 4) - 2;
    return Array.from({ length: count }, (_, k) => ({
      pixel: origin + decade * k + 0.5 * normal(),
      value: 10 ** (first + k),
    }));
  };
  const named = (ticks: { pixel: number; value: number }[], wrong: readonly number[]): boolean => {
    try {
      calibrateAxes({ ...plot, frequency: { kind: "log", ticks } });
      return false;
    } catch (error) {
      return (
        error instanceof MalformedDataError && wrong.some((index) => error.message.includes(`tick ${index + 1} (`))
      );
    }
  };

  test("off by a decade, in at least 99 % of 500", () => {
    let found = 0;
    for (let run = 0; run < 500; run += 1) {
      const ticks = drawn();
      const wrong = Math.floor(uniform() * ticks.length);
      const tick = ticks[wrong] as { pixel: number; value: number };
      ticks[wrong] = { pixel: tick.pixel, value: tick.value * (uniform() < 0.5 ? 10 : 0.1) };
      if (named(ticks, [wrong])) found += 1;
    }
    expect(found).toBeGreaterThanOrEqual(495);
  });

  test("two ticks swapped, in at least 99 % of 500", () => {
    let found = 0;
    for (let run = 0; run < 500; run += 1) {
      const ticks = drawn();
      const one = Math.floor(uniform() * ticks.length);
      const other = (one + 1 + Math.floor(uniform() * (ticks.length - 1))) % ticks.length;
      const [a, b] = [ticks[one], ticks[other]] as { pixel: number; value: number }[];
      if (a === undefined || b === undefined) continue;
      ticks[one] = { pixel: a.pixel, value: b.value };
      ticks[other] = { pixel: b.pixel, value: a.value };
      if (named(ticks, [one, other])) found += 1;
    }
    expect(found).toBeGreaterThanOrEqual(495);
  });

  test("honest ticks pass, all 500", () => {
    for (let run = 0; run < 500; run += 1) {
      const ticks = drawn();
      expect(() => calibrateAxes({ ...plot, frequency: { kind: "log", ticks } })).not.toThrow();
    }
  });
});

describe("bad calibrations are refused in one sentence", () => {
  const withTicks = (...ticks: [number, number][]): AxesDescription => ({
    ...plot,
    frequency: { kind: "log", ticks: ticks.map(([pixel, value]) => ({ pixel, value })) },
  });
  const referencePoints = [0, 1, 2].map((k) => ({ x: 100 * k, y: 50 * k, frequency: 10 ** k, density: 10 ** (k - 9) }));

  test.each<[AxesDescription, RegExp]>([
    [withTicks([0, 1]), /at least two ticks/],
    [withTicks([0, 1], [0, 10]), /at least two ticks at different pixels/],
    [withTicks([0, 0], [9, 10]), /frequency axis must be above zero and finite; got 0/],
    [withTicks([0, -1], [9, 10]), /above zero/],
    [withTicks([Number.NaN, 1], [9, 10]), /Tick 1 of the frequency axis needs a finite pixel/],
    [withTicks([0, 1], [50, 100], [100, 10]), /contradicts itself|do not lie on one line/],
    [{ ...plot, referencePoints }, /lie on one line/],
    [{ ...plot, referencePoints: referencePoints.slice(0, 2) }, /at least three reference points; got 2/],
    [{ ...plot, frequency: { kind: "dB" } }, /frequency axis must be 'log' or 'linear'/],
    [{ ...plot, density: { kind: "octaves" } } as never, /must be 'log', 'linear' or 'dB'; got octaves/],
    [{ ...plot, tickErrorPixels: 0 }, /tickErrorPixels must be a positive finite number/],
    [{ ...plot, ticks: [] } as never, /no option "ticks"/],
  ])("case %#", (description, message) => {
    expect(() => calibrateAxes(description)).toThrow(message);
    expect(() => calibrateAxes(description)).toThrow(NoiseError);
  });
});
