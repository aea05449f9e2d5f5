import { readdirSync, readFileSync } from "node:fs";
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { NoiseError } from "../../src/ground/errors.js";
import { termsAt } from "../../src/numerics/power-law.js";
import { turnsOf } from "../../src/numerics/turns.js";
import type { LobedGain, RationalGain, Weighting } from "../../src/weighting/weighting.js";
import { type Case, cases, madeBy, make } from "./cases.js";

const room = new URL("../../src/weighting/", import.meta.url);

/** Factories are named after their file; makers of the room are not. */
const factories = readdirSync(room)
  .filter((file) => file.endsWith(".ts") && file !== "make-weighting.ts")
  .map((file) => file.replace(/\.ts$/, ""))
  .map((file) => ({ file, name: file.replace(/-(\w)/g, (_, letter: string) => letter.toUpperCase()) }))
  .filter(({ file, name }) =>
    new RegExp(`export function ${name}\\([^)]*\\): Weighting\\b`).test(
      readFileSync(new URL(`${file}.ts`, room), "utf8"),
    ),
  )
  .map(({ name }) => name);

const all = Object.keys(cases).flatMap((name) => madeBy(name).map(({ made }) => made));
const named = all.map((made) => [made.name, made] as const);

test("every factory of the room is in the table of cases, and is exported", () => {
  expect(factories.toSorted()).toEqual(Object.keys(cases).toSorted());
  expect(all.length).toBeGreaterThan(80);
});

describe("every weighting", () => {
  test.each(named)("%s is nonnegative and finite wherever it is defined", (_, made) => {
    const [low, high] = rangeOf(made);
    if (made.support[0] === 0) expectGain(made.powerGainAt(0));
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), (share) => {
        const hz = Math.min(Math.max(low * (high / low) ** share, low), high);
        expectGain(made.powerGainAt(hz));
      }),
      { seed: 1930, numRuns: 300 },
    );
  });

  test.each(named)("%s has ascending knots inside its support", (_, made) => {
    const { knots, support } = made;
    expect(knots.every((hz) => hz > support[0] && hz < support[1])).toBe(true);
    expect(knots.every((hz, index) => index === 0 || hz > (knots[index - 1] as number))).toBe(true);
  });

  test.each(named)("%s goes as its end exponents say", (_, made) => {
    const [first, last] = made.support;
    if (first === 0) expect(Math.abs(slopeBetween(made, lowEnd(made)) + made.lowExponent)).toBeLessThan(1e-5);
    // A hundred poles fall below the range of doubles before they are a power law.
    if (last === Number.POSITIVE_INFINITY && made.highExponent < 50)
      expect(Math.abs(slopeBetween(made, highEnd(made)) + made.highExponent)).toBeLessThan(1e-5);
  });

  test.each(named)("%s has a name fit for a report and is frozen to its last array", (_, made) => {
    expect(made.name).toMatch(/^\S.*\S$/);
    expect(made.name).not.toMatch(/NaN|undefined|Infinity|object/);
    expect(looseIn(made)).toEqual([]);
  });

  test.each(named.filter(([, made]) => made.rational !== undefined))("%s is its poles and zeros", (_, made) => {
    for (const hz of ordinary(made))
      if (apart(made.rational as RationalGain, hz))
        expectRelative(rationalAt(made.rational as RationalGain, hz), made.powerGainAt(hz), 1e-11, `at ${hz} Hz`);
  });

  test.each(named.filter(([, made]) => made.lobes !== undefined))("%s is its lobes", (_, made) => {
    const lobes = made.lobes as LobedGain;
    for (const share of [0.13, 0.5, 1.2, 3.7, 22.2, 503.1, 7001.9]) {
      const hz = share * lobes.lobeHz;
      const { value, size } = lobedAt(lobes, hz);
      expect(Math.abs(value - made.powerGainAt(hz))).toBeLessThanOrEqual(1e-11 * size);
      expectRelative(lobes.coreAt(hz) * lobes.smoothAt(hz), made.powerGainAt(hz), 1e-14);
    }
    expect(lobes.parts.flatMap(({ waves }) => waves).every(({ seconds }) => seconds >= 0)).toBe(true);
  });

  test.each(named.filter(([, made]) => made.saturating !== undefined))("%s saturates as it says", (_, made) => {
    const { cutoffHz, order, numeratorOrder } = made.saturating as NonNullable<Weighting["saturating"]>;
    for (const hz of ordinary(made)) {
      const u = hz / cutoffHz;
      expectRelative(made.powerGainAt(hz), u ** (2 * numeratorOrder) / (1 + u ** (2 * order)), 1e-13);
    }
  });

  test.each(named.filter(([, made]) => made.pieces !== undefined))("%s is power laws on its pieces", (_, made) => {
    const pieces = made.pieces ?? [];
    expect([pieces[0]?.from, pieces.at(-1)?.to]).toEqual(made.support);
    for (const hz of ordinary(made)) {
      const piece = pieces.find(({ from, to }) => hz >= from && hz <= to);
      expectRelative(termsAt(piece?.terms ?? [], hz), made.powerGainAt(hz), 2e-14);
    }
  });

  test.each(named.filter(([, made]) => made.repeatsHz !== undefined))("%s repeats at its rate", (_, made) => {
    const rate = made.repeatsHz as number;
    const peak = Math.max(...[0, 0.1, 0.25, 0.5].map((share) => made.powerGainAt(share * rate)));
    for (const share of [0.013, 0.21, 0.37, 0.5])
      for (const turns of [1, 2, 1000])
        expect(Math.abs(made.powerGainAt((share + turns) * rate) - made.powerGainAt(share * rate)) / peak).toBeLessThan(
          1e-9,
        );
  });
});

const withOptions = Object.entries(cases).filter(([, { good }]) => good.length > 0);

describe.each(withOptions)("%s", (name, { good, bad, halfPowerAt }) => {
  test.each(halfPowerAt === undefined ? [] : madeBy(name))(
    "passes half the power at its cutoffs",
    ({ options, made }) => {
      for (const hz of (halfPowerAt as NonNullable<Case["halfPowerAt"]>)(options as never))
        expectRelative(made.powerGainAt(hz), 0.5, 1e-14, `${made.name} at ${hz} Hz`);
    },
  );

  test.each(good.map((options) => [options] as const))(
    "leaves its inputs alone and does not follow their later changes",
    (options) => {
      const given = structuredClone(options);
      const made = make(name, given);
      expect(given).toEqual(options);
      const before = ordinary(made).map((hz) => made.powerGainAt(hz));
      scramble(given);
      expect(ordinary(made).map((hz) => made.powerGainAt(hz))).toEqual(before);
      expect(() => make(name, frozen(structuredClone(options)))).not.toThrow();
    },
  );

  test.each(bad)("refuses %j in one sentence", (options, fault) => {
    const refusal = refusalOf(() => make(name, options));
    expect(refusal).toContain(fault);
    const value: unknown = Reflect.get(options, fault);
    if (typeof value === "number") expect(refusal).toContain(String(value));
    expect(refusal).toMatch(/^\S[^\n]*\.$/);
    expect(refusal).not.toMatch(/[.!?] [A-Z]/);
  });

  test.each(good.filter((options) => !Array.isArray(options)))("refuses an option it does not know", (options) => {
    expect(refusalOf(() => make(name, { ...options, cutofHz: 1 }))).toContain('no option "cutofHz"');
  });

  test("refuses to be made of nothing", () => {
    expect(refusalOf(() => make(name, undefined))).toMatch(/\.$/);
  });
});

function expectGain(gain: number): void {
  expect(gain >= 0 && gain < Number.POSITIVE_INFINITY).toBe(true);
}

/** Sixty decades around the knots, or the support. */
function rangeOf({ support, knots }: Weighting): readonly [number, number] {
  const [low, high] = [knots[0] ?? 1, knots.at(-1) ?? 1];
  return [
    support[0] === 0 ? low * 1e-30 : support[0],
    support[1] === Number.POSITIVE_INFINITY ? high * 1e30 : support[1],
  ];
}

/** Frequencies around the knots that no symmetry singles out. */
function ordinary({ support, knots }: Weighting): number[] {
  const [low, high] = [knots[0] ?? 1, knots.at(-1) ?? 1];
  return Array.from({ length: 41 }, (_, index) => 0.0123 * low * ((high / low) * 7654) ** (index / 40)).filter(
    (hz) => hz > support[0] && hz < support[1],
  );
}

function lowEnd({ knots, lowExponent }: Weighting): readonly [number, number] {
  const reach = reachFor(lowExponent);
  return [(knots[0] ?? 1) / reach / 10, (knots[0] ?? 1) / reach];
}

/** Far enough to be a power law to 1e-9, near enough to stay above 1e-290. */
function reachFor(exponent: number): number {
  return 10 ** Math.min(12, 140 / Math.abs(exponent));
}

/** Far up: at the same place of two lobes, or of two periods, where there are any. */
function highEnd({ knots, lobes, repeatsHz, highExponent }: Weighting): readonly [number, number] {
  const step = repeatsHz ?? lobes?.lobeHz;
  if (step !== undefined) return [(1e7 + 0.137) * step, (1e9 + 0.137) * step];
  const reach = reachFor(highExponent);
  return [(knots.at(-1) ?? 1) * reach, (knots.at(-1) ?? 1) * 10 * reach];
}

function slopeBetween(made: Weighting, [one, other]: readonly [number, number]): number {
  return Math.log(made.powerGainAt(other) / made.powerGainAt(one)) / Math.log(other / one);
}

/** Paths of objects that somebody could still change. */
function looseIn(value: unknown, path = "weighting"): string[] {
  if (typeof value !== "object" || value === null) return [];
  const inner = Object.entries(value).flatMap(([key, part]) => looseIn(part, `${path}.${key}`));
  return Object.isFrozen(value) ? inner : [path, ...inner];
}

function frozen<Value>(value: Value): Value {
  if (typeof value === "object" && value !== null) for (const part of Object.values(value)) frozen(part);
  return Object.freeze(value);
}

/** Turns every number of an input into another, in place. */
function scramble(value: unknown): void {
  if (typeof value !== "object" || value === null) return;
  const record = value as Record<string, unknown>;
  for (const key of Object.keys(record)) {
    if (typeof record[key] === "number") record[key] = 17.3;
    else scramble(record[key]);
  }
}

function rationalAt({ gain, zerosAtOrigin, zeros, poles }: RationalGain, hz: number): number {
  let value = gain;
  for (let k = 0; k < Math.max(poles.length, zeros.length, zerosAtOrigin); k += 1) {
    const [pole, zero] = [poles[k], zeros[k]];
    if (pole !== undefined) value /= pole.re * pole.re + (hz - pole.im) ** 2;
    if (zero !== undefined) value *= zero.re * zero.re + (hz - zero.im) ** 2;
    if (k < zerosAtOrigin) value *= hz * hz;
  }
  return value;
}

/** Not so close to a pole or zero beside the axis that its rounding tells. */
function apart({ zeros, poles }: RationalGain, hz: number): boolean {
  return [...zeros, ...poles].every(({ re, im }) => Math.hypot(re, hz - Math.abs(im)) > 1e-4 * hz);
}

function lobedAt(lobes: LobedGain, hz: number): { readonly value: number; readonly size: number } {
  let value = 0;
  let size = 0;
  for (const part of lobes.parts) {
    const envelope = part.envelopeAt(hz) * lobes.smoothAt(hz);
    for (const { seconds, cosine, sine } of part.waves) {
      const phase = 2 * Math.PI * turnsOf(hz, seconds);
      value += envelope * (cosine * Math.cos(phase) + sine * Math.sin(phase));
      size += Math.abs(envelope) * (Math.abs(cosine) + Math.abs(sine));
    }
  }
  return { value, size };
}

function refusalOf(act: () => unknown): string {
  try {
    act();
  } catch (error) {
    expect(error).toBeInstanceOf(NoiseError);
    return (error as NoiseError).message;
  }
  throw new Error("expected a refusal, got none");
}
