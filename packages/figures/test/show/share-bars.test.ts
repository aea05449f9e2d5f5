import { describe, expect, test } from "vitest";
import { expectRelative } from "../../../../test/support/relative.js";
import { boxesOverlap, boxInside } from "../../src/show/box.js";
import { layoutShareBars, type ShareBarsOptions, shareBars } from "../../src/show/share-bars.js";
import { expectSound, textsOf } from "./support/plot-claims.js";

const strain: ShareBarsOptions = {
  rows: [
    { label: "bridge", share: 0.0956, text: "5.606 nV" },
    { label: "amplifier", share: 0.872, text: "16.93 nV" },
    { label: "reference & <ripple>", share: 0.0004, text: "1.1 nV" },
  ],
  title: "Strain channel",
  note: "Invented parts.",
};

function expectTidy(options: ShareBarsOptions): void {
  const { frame, rows, texts } = layoutShareBars(options);
  const boxes = [...texts, ...rows.flatMap(({ label, value }) => [...label, value])].map(({ box }) => box);
  for (const [index, one] of boxes.entries()) {
    expect(boxInside(one, { x: 0, y: 0, ...frame })).toBe(true);
    for (const other of boxes.slice(index + 1)) expect(boxesOverlap(one, other)).toBe(false);
  }
  for (const { bar, value } of rows) expect(boxesOverlap(bar, value.box)).toBe(false);
}

describe("ranked shares", () => {
  test("stand largest first, as long as their share", () => {
    const { rows } = layoutShareBars(strain);
    expect(rows.map(({ label }) => label[0]?.text)).toEqual(["amplifier", "bridge", "reference & <ripple>"]);
    const [first, second] = rows.map(({ bar }) => bar.width);
    expectRelative((second ?? 0) / (first ?? 1), 0.0956 / 0.872, 1e-12);
  });

  test("carry share and value; what is below a tenth of a per cent says so", () => {
    expect(layoutShareBars(strain).rows.map(({ value }) => value.text)).toEqual([
      "87.2 % · 16.93 nV",
      "9.6 % · 5.606 nV",
      "< 0.1 % · 1.1 nV",
    ]);
  });

  test("that take away are drawn hollow, left of zero, and rank by their size", () => {
    const rows = [...strain.rows, { label: "correlated", share: -0.2, text: "" }];
    const layout = layoutShareBars({ rows });
    const taken = layout.rows[1];
    expect(taken?.label[0]?.text).toBe("correlated");
    expect(taken?.negative).toBe(true);
    expectRelative((taken?.bar.x ?? 0) + (taken?.bar.width ?? 0), layout.zero, 1e-12);
    expect(taken?.value.text).toBe("−20.0 %");
    expectTidy({ rows });
  });

  test("beyond two dozen are put together in one line", () => {
    const rows = Array.from({ length: 100 }, (_, index) => ({ label: `source ${index}`, share: 0.01, text: "1 nV" }));
    const { texts, rows: placed } = layoutShareBars({ rows });
    expect(placed.length).toBe(24);
    expect(placed[0]?.label[0]?.text).toBe("source 0");
    expect(texts.map(({ text }) => text)).toContain("and 76 more, together 76.0 %");
  });

  test("are a sound picture whose texts are escaped and do not overlap", () => {
    const long = { label: "a label that goes on and on about load and gain ".repeat(4), share: 0.03, text: "3 nV" };
    for (const options of [strain, { rows: [...strain.rows, long], width: 400 }, { rows: [{ ...long, share: 0 }] }]) {
      expectTidy(options);
      expectSound(shareBars(options));
    }
    expect(textsOf(expectSound(shareBars(strain)))).toContain("reference & <ripple>");
  });

  test("give the same text twice and leave the rows in their order", () => {
    expect(shareBars(strain)).toBe(shareBars(strain));
    expect(strain.rows[0]?.label).toBe("bridge");
  });

  test("refuse no rows, a share that is no number and unknown options", () => {
    expect(() => shareBars({ rows: [] })).toThrow(/at least one row/);
    expect(() => shareBars({ rows: [{ label: "R1", share: Number.NaN, text: "" }] })).toThrow(
      /share of "R1" must be a finite number/,
    );
    expect(() => shareBars({ ...strain, height: 3 } as ShareBarsOptions)).toThrow(/knows no option "height"/);
  });
});
