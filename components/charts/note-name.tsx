import { Fragment } from "react";
import { Sharp, NoteName as WrittenNote } from "@/components/ui/glyphs";
import { noteText, SHARP } from "./note-spelling";

/** Plain words in which every sharp is drawn and read as "sharp": the shipped faces have no such character. */
export function SharpText({ text }: { text: string }) {
  return text.split(SHARP).map((part, index) => (
    <Fragment key={index}>
      {index > 0 && <Sharp />}
      {part}
    </Fragment>
  ));
}

/** The name of a key as printed, read as "C sharp 4". */
export function NoteName({ midi, className }: { midi: number; className?: string }) {
  return <WrittenNote name={noteText(midi)} className={className} />;
}
