import type { Stage } from "@/lib/readings/schema";
import { stageWords } from "@/lib/readings/stage-words";

/** "As found", where the stage begins a line. */
export function stageTitle(stage: Stage): string {
  const words = stageWords[stage];
  return words.charAt(0).toUpperCase() + words.slice(1);
}
