export * from "./auth";
export * from "./customers";
export * from "./diary";
export * from "./instruments";
export * from "./plans";
export * from "./readings";
export * from "./shop";
export * from "./visits";
