import { describe, expect, it } from "vitest";
import { estimatedTravel, greatCircleKilometres } from "./travel";

describe("the way between two places", () => {
  it("a degree along a meridian is a 360th of the mean Earth's circumference", () => {
    // IUGG mean radius 6371.0088 km: 2πR/360 = 111.195 km.
    const from = { latitude: 52, longitude: -6 };
    expect(greatCircleKilometres(from, { latitude: 53, longitude: -6 })).toBeCloseTo(111.195, 3);
  });

  it("a degree along a parallel shrinks with the cosine of the latitude", () => {
    const kilometres = greatCircleKilometres({ latitude: 60, longitude: 0 }, { latitude: 60, longitude: 1 });
    expect(kilometres / 111.195).toBeCloseTo(0.5, 3);
  });

  it("is half the circumference between opposite points, and nothing to the place itself", () => {
    const here = { latitude: 30, longitude: 10 };
    expect(greatCircleKilometres(here, { latitude: -30, longitude: -170 })).toBeCloseTo(20015.1, 1);
    expect(greatCircleKilometres(here, here)).toBe(0);
  });

  it("crosses the date line by the short way", () => {
    const kilometres = greatCircleKilometres(
      { latitude: 0, longitude: 179.5 },
      { latitude: 0, longitude: -179.5 },
    );
    expect(kilometres).toBeCloseTo(111.195, 3);
  });

  it("takes the shop's detour and speed, and rounds up", () => {
    const travel = estimatedTravel({ detourFactor: 1.3, kilometresPerHour: 50 });
    // 111.195 km · 1.3 / 50 km/h = 173.46 min.
    expect(travel({ latitude: 52, longitude: -6 }, { latitude: 53, longitude: -6 })).toBe(174);
    expect(travel({ latitude: 52, longitude: -6 }, { latitude: 52, longitude: -6 })).toBe(0);
  });
});
