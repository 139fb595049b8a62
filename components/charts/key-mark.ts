/** What is known of a key, as the ribbon shows it. */
export type KeyMark = { midi: number; kind: "measured" | "next" | "flagged" };
