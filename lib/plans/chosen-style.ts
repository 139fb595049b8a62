import "server-only";
import type { Tx } from "@/db/client";
import { defaultStyleOf } from "@/db/queries/plans";
import { styleById } from "@/db/queries/styles";
import { builtInStyle, isBuiltInStyle, styleFromRegisters } from "@/lib/acoustics";
import type { Style } from "@/lib/acoustics/types";
import { invalid } from "@/lib/errors";
import { builtInWords } from "./rules";

export type ChosenStyle = { ref: string; name: string; style: Style };

/** The style that a name, a house style's id, or the shop's habit stands for, over an instrument's keys. */
export async function chosenStyle(
  tx: Tx,
  shopId: string,
  ref: string | undefined,
  { firstMidi, lastMidi }: { firstMidi: number; lastMidi: number },
): Promise<ChosenStyle> {
  const wanted = ref ?? (await defaultStyleOf(tx, shopId));
  if (isBuiltInStyle(wanted)) {
    return {
      ref: wanted,
      name: builtInWords[wanted].title,
      style: builtInStyle(wanted, firstMidi, lastMidi),
    };
  }
  const house = isUuid(wanted) ? await styleById(tx, shopId, wanted) : undefined;
  if (!house) throw invalid({ style: "There is no such style in this shop." });
  return { ref: house.id, name: house.name, style: styleFromRegisters(house, firstMidi, lastMidi) };
}

function isUuid(text: string): boolean {
  return /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/i.test(text);
}
