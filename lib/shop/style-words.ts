/** The built-in styles of stretch as they stand in a list. */
export const styleWords: ReadonlyArray<{ value: string; label: string }> = [
  { value: "close", label: "Close" },
  { value: "even", label: "Even" },
  { value: "wide", label: "Wide" },
  { value: "published", label: "Published curve of octave types" },
];
