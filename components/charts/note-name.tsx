import { Fragment } from "react";
import { noteText, SHARP, spokenNote } from "./note-spelling";

/** Outline of a sharp in a box of 10 by 16; the shipped faces have no such character. */
export const SHARP_PATH = "M3 1.5v14M7 .5v14M.8 6l8.4-2M.8 12l8.4-2";

export function SharpSign() {
  return (
    <svg
      viewBox="0 0 10 16"
      aria-hidden="true"
      style={{
        display: "inline-block",
        width: ".5em",
        height: ".78em",
        verticalAlign: ".06em",
        marginLeft: ".02em",
      }}
    >
      <path d={SHARP_PATH} fill="none" stroke="currentColor" strokeWidth="1.5" />
    </svg>
  );
}

/** Plain words in which every sharp is drawn and read as "sharp". */
export function SharpText({ text }: { text: string }) {
  if (!text.includes(SHARP)) return text;
  const parts = text.split(SHARP);
  return (
    <>
      <span className="sr-only">{text.replaceAll(SHARP, " sharp ")}</span>
      <span aria-hidden="true">
        {parts.map((part, index) => (
          <Fragment key={index}>
            {index > 0 && <SharpSign />}
            {part}
          </Fragment>
        ))}
      </span>
    </>
  );
}

/** A note's name as printed, with its spoken name for screen readers. */
export function NoteName({ midi, className }: { midi: number; className?: string }) {
  const [letter = "", octave = ""] = noteText(midi).split(SHARP);
  const sharp = octave !== "";
  return (
    <span role="img" aria-label={spokenNote(midi)} className={className} style={{ whiteSpace: "nowrap" }}>
      {letter}
      {sharp && <SharpSign />}
      {octave}
    </span>
  );
}
