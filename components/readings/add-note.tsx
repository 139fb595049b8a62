"use client";

import { type FormEvent, useEffect, useId, useRef, useState } from "react";
import { SharpText } from "@/components/charts/note-name";
import { noteText } from "@/components/charts/note-spelling";
import { Button } from "@/components/ui/button";
import { keyFromName } from "@/lib/acoustics";

/** A note by its name or MIDI number. */
export function AddNote({
  range,
  onChoose,
  beginHere = false,
}: {
  range: { firstMidi: number; lastMidi: number };
  /** On a sheet with nothing read yet, typing begins here without a click. */
  beginHere?: boolean;
  onChoose: (midi: number) => void;
}) {
  const [text, setText] = useState("");
  const [fault, setFault] = useState<string | null>(null);
  const id = useId();
  const input = useRef<HTMLInputElement>(null);

  useEffect(() => {
    // Only from nowhere: a place the person has gone to is theirs.
    if (beginHere && document.activeElement === document.body) input.current?.focus();
  }, [beginHere]);

  function add(event: FormEvent) {
    event.preventDefault();
    const written = text.trim();
    const midi = /^\d{1,3}$/.test(written) ? Number(written) : keyFromName(written.replaceAll(/\s/g, ""));
    if (midi === null) return setFault("No note has this name. Write one such as A4, or a MIDI number.");
    if (midi < range.firstMidi || midi > range.lastMidi) {
      return setFault(
        `${noteText(midi)} is not on this instrument, whose keys run from ${noteText(range.firstMidi)} to ${noteText(range.lastMidi)}.`,
      );
    }
    setText("");
    setFault(null);
    onChoose(midi);
  }

  return (
    <form onSubmit={add} className="flex min-w-0 flex-wrap items-center gap-2" data-no-print noValidate>
      <label htmlFor={id} className="sr-only">
        Add a note
      </label>
      <input
        ref={input}
        id={id}
        value={text}
        onChange={(event) => {
          setText(event.target.value);
          setFault(null);
        }}
        placeholder="Note, as A4"
        autoComplete="off"
        autoCapitalize="characters"
        spellCheck={false}
        aria-invalid={fault ? true : undefined}
        aria-describedby={fault ? `${id}-fault` : undefined}
        className="h-9 w-28 rounded border border-edge! bg-sheet px-3 text-16 touch:h-11"
      />
      <Button type="submit">Add note</Button>
      {fault ? (
        <p id={`${id}-fault`} role="alert" className="w-full text-rust">
          <SharpText text={fault} />
        </p>
      ) : null}
    </form>
  );
}
