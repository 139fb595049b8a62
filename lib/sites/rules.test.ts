import { expect, it } from "vitest";
import { addressLine, positionFaults } from "./rules";

it("asks for the other half of a position, and takes none as none", () => {
  expect(positionFaults({})).toEqual({});
  expect(positionFaults({ latitude: 0, longitude: 0 })).toEqual({});
  expect(Object.keys(positionFaults({ latitude: 53.3, longitude: null }))).toEqual(["longitude"]);
  expect(Object.keys(positionFaults({ longitude: -6.2 }))).toEqual(["latitude"]);
});

it("writes an address without stray commas", () => {
  expect(addressLine({ street: "14 Rope Walk", postalCode: "F91 X2Y4", city: "Port Averil" })).toBe(
    "14 Rope Walk, F91 X2Y4 Port Averil",
  );
  expect(addressLine({ street: "", postalCode: "", city: "Port Averil" })).toBe("Port Averil");
  expect(addressLine({ street: "", postalCode: "", city: "" })).toBe("");
});
