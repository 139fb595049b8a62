"use client";

import { Segmented } from "../ui/segmented";
import { setLetterKeys, useLetterKeys } from "./letter-keys";

const choices = [
  { value: "on", label: "On" },
  { value: "off", label: "Off" },
] as const;

/** Where a keyboard is: J, K, X and the slash can be turned off. */
export function LetterKeysSwitch() {
  const on = useLetterKeys();
  return (
    <Segmented
      label="Keys of one letter: J, K, X and /"
      hideLabel={false}
      options={choices}
      value={on ? "on" : "off"}
      onChange={(value) => setLetterKeys(value === "on")}
      className="touch:hidden"
    />
  );
}
