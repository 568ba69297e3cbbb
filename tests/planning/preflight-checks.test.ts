import { describe, expect, it } from "vitest";
import { planRun } from "@/lib/planning/plan";
import { calibrationCheck, cautionsFor, ratingsCheck, roomCheck } from "@/lib/planning/preflight-checks";
import type { PreflightCheck } from "@/lib/schemas/run";
import { preflightCheckSchema } from "@/lib/schemas/run";
import { box, decade, errorFrom } from "../metrology/builders";
import { bench, model, nineDecades, recipe, section, type SectionChanges } from "./builders";

const limits = { lowestCelsius: 18, highestCelsius: 28, highestHumidityPercent: 60 };

function plan(changes: SectionChanges, standard = nineDecades) {
  const room = { celsius: 23, humidityPercent: null };
  return planRun({ document: recipe(section(changes)), bench: bench({ standard }), model: model(), room });
}

function plain(check: PreflightCheck) {
  expect(preflightCheckSchema.safeParse(check).success).toBe(true);
  const [finding, cure] = [check.finding, check.cure].map((text) => text?.replaceAll("\u2009", " ") ?? null);
  return { state: check.state, finding, cure };
}

describe("calibrationCheck", () => {
  const due = (dueOn: string, name = "DB-9") =>
    box([decade(1e6)], { model: name, calibration: { certificate: "T-1", calibratedOn: "2025-12-12", dueOn } });

  it("is ready with more than 30 days to go", () => {
    expect(plain(calibrationCheck([due("2026-12-12")], "2026-06-01"))).toEqual({
      state: "ready",
      finding: "Corvane DB-9 until 12 Dec 2026",
      cure: null,
    });
    expect(calibrationCheck([due("2026-12-12")], "2026-11-11").state).toBe("ready");
  });

  it("points out the last 30 days, the due date included", () => {
    expect(plain(calibrationCheck([due("2026-12-12")], "2026-11-12"))).toMatchObject({ state: "look" });
    expect(plain(calibrationCheck([due("2026-12-12")], "2026-12-11")).cure).toBe(
      "A calibration ends in 1 day: plan the next one.",
    );
    expect(plain(calibrationCheck([due("2026-12-12")], "2026-12-12")).cure).toBe(
      "A calibration ends today: plan the next one.",
    );
  });

  it("blocks from the day after, naming only what is overdue", () => {
    const check = calibrationCheck([due("2027-03-01"), due("2026-12-12", "DB-3")], "2026-12-13");
    expect(plain(check)).toMatchObject({ state: "blocked", finding: "overdue: Corvane DB-3 since 12 Dec 2026" });
  });

  it("counts days over a leap day", () => {
    expect(calibrationCheck([due("2028-03-01")], "2028-01-30").state).toBe("ready");
    expect(calibrationCheck([due("2028-03-01")], "2028-01-31").state).toBe("look");
  });

  it("refuses a day that does not exist", () => {
    for (const today of ["2026-02-30", "yesterday", ""]) {
      expect(errorFrom(() => calibrationCheck([due("2026-12-12")], today))).toMatchObject({
        name: "MetrologyError",
        field: "date",
      });
    }
  });
});

describe("ratingsCheck", () => {
  it("is ready when nothing but the recipe itself leaves points out", () => {
    expect(plain(ratingsCheck(plan({ excluded: [[1e9, 500]] })))).toEqual({
      state: "ready",
      finding: "all 3 points",
      cure: null,
    });
  });

  it("points out what is left out by force, with the first reasons", () => {
    const check = ratingsCheck(plan({ nominalOhms: [1e6], testVolts: [500, 600, 700, 800] }));
    expect(plain(check)).toEqual({
      state: "look",
      finding:
        "1 point, 3 left out: 1.000 MΩ at 600 V, Pellham IR-10 has no test voltage of 600 V; " +
        "1.000 MΩ at 700 V, Pellham IR-10 has no test voltage of 700 V; and 1 more",
      cure: "The run goes on without them.",
    });
  });

  it("blocks when no point is left, by force or by the recipe", () => {
    expect(plain(ratingsCheck(plan({ nominalOhms: [500e9], testVolts: [500] })))).toMatchObject({
      state: "blocked",
      finding: expect.stringMatching(/^no point can be run: 500\.0 GΩ at 500 V, DB-9 makes/u),
    });
    const emptied = plan({ nominalOhms: [1e6], testVolts: [500], excluded: [[1e6, 500]] });
    expect(plain(ratingsCheck(emptied))).toMatchObject({
      state: "blocked",
      finding: "the recipe leaves every point out",
    });
  });
});

describe("roomCheck", () => {
  it("is ready within the limits, ends included", () => {
    expect(plain(roomCheck({ celsius: 22.84, humidityPercent: 41 }, limits))).toEqual({
      state: "ready",
      finding: "22.8 °C, 41 %",
      cure: null,
    });
    for (const celsius of [18, 28]) expect(roomCheck({ celsius, humidityPercent: 60 }, limits).state).toBe("ready");
  });

  it("blocks outside the limits and says what to wait for", () => {
    expect(plain(roomCheck({ celsius: 8.1, humidityPercent: 55 }, limits))).toEqual({
      state: "blocked",
      finding: "8.1 °C is outside",
      cure: "Wait until the room is between 18 and 28 °C.",
    });
    expect(plain(roomCheck({ celsius: 23, humidityPercent: 61 }, limits))).toMatchObject({
      state: "blocked",
      finding: "23.0 °C is inside, humidity 61 % is too high",
    });
  });

  it("asks for a look without a humidity, and blocks without a reading", () => {
    expect(roomCheck({ celsius: 23, humidityPercent: null }, limits).state).toBe("look");
    expect(roomCheck(null, limits).state).toBe("blocked");
  });

  it("does not pass a reading that is no number", () => {
    expect(roomCheck({ celsius: NaN, humidityPercent: 40 }, limits).state).toBe("blocked");
    expect(roomCheck({ celsius: 23, humidityPercent: NaN }, limits).state).toBe("blocked");
  });
});

describe("cautionsFor", () => {
  it("asks for three confirmations, with the highest voltage of the run", () => {
    const cautions = cautionsFor(plan({ testVolts: [250, 1000] })).map((text) => text.replaceAll("\u2009", " "));
    expect(cautions).toHaveLength(3);
    expect(cautions[1]).toBe("The leads are undamaged and rated for 1250 V, the most that this run may put out.");
  });

  it("rounds the voltage up, never down", () => {
    expect(
      cautionsFor(plan({ nominalOhms: [50_100], testVolts: [1000] }, box([decade(10e3), decade(100)])))[1],
    ).toContain("101");
  });

  it("asks for nothing where nothing will be switched on", () => {
    expect(cautionsFor({ points: [], excluded: [] })).toEqual([]);
  });
});
