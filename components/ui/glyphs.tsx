import { cx } from "./class-names";

/*
 * Neither typeface has a sharp, a flat or a superscript minus. They are drawn on the line of the
 * words and scale with them; readers are told the word.
 */

function Accidental({ d, word }: { d: string; word: string }) {
  return (
    <>
      <svg
        viewBox="0 0 10 16"
        className="ml-[0.02em] inline-block h-[0.78em] w-[0.5em] align-[0.06em]"
        aria-hidden="true"
        focusable="false"
      >
        <path d={d} fill="none" stroke="currentColor" strokeWidth="1.5" />
      </svg>
      <span className="sr-only"> {word} </span>
    </>
  );
}

export function Sharp() {
  return <Accidental word="sharp" d="M3 1.500v14M7 .5v14M.8 6l8.400-2M.8 12l8.400-2" />;
}

function Flat() {
  return <Accidental word="flat" d="M2 .5v14c2.800-1.600 5.600-3.600 5.600-6.200 0-2.600-3.200-3-5.600-.6" />;
}

/** A note's name such as "C#3" or "Bb4", with its accidental drawn. */
export function NoteName({ name, className }: { name: string; className?: string }) {
  const parts = /^([A-G])([#♯b♭]?)(-?\d+)?$/.exec(name);
  if (!parts) return <span className={className}>{name}</span>;
  const [, letter, accidental, octave] = parts;
  return (
    <span className={cx("whitespace-nowrap", className)}>
      {letter}
      {accidental === "#" || accidental === "♯" ? <Sharp /> : null}
      {accidental === "b" || accidental === "♭" ? <Flat /> : null}
      {octave?.replace("-", "−")}
    </span>
  );
}

/** A power of ten such as × 10⁻⁴, with a true minus inside a raised figure. */
export function PowerOfTen({ exponent }: { exponent: number }) {
  return (
    <span className="whitespace-nowrap">
      × 10<sup>{exponent < 0 ? `−${-exponent}` : exponent}</sup>
    </span>
  );
}
