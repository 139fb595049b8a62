import { expect, it } from "vitest";
import { airSentence, pitchSentence } from "./plain-words";

const said = (asFoundCents: number | null, asLeftCents: number | null) =>
  pitchSentence({ asFoundCents, asLeftCents });

it("says in plain words how far an instrument stood from pitch", () => {
  expect(said(-6.4, 0.1)).toBe("It stood 6 cents below pitch when we came, and at pitch when we left.");
  expect(said(3.8, null)).toBe("It stood 4 cents above pitch when we came.");
  expect(said(null, -1.2)).toBe("It stood 1 cent below pitch when we left.");
  expect(said(0.4, -0.9)).toBe("It stood at pitch when we came and when we left.");
  expect(said(null, null)).toBe("Its pitch was not measured.");
});

it("says nothing of air that nobody measured", () => {
  expect(airSentence(57.6)).toBe("The air in the room was at 58 % humidity.");
  expect(airSentence(null)).toBeNull();
});
